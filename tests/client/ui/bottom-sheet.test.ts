import { describe, expect, it } from 'vitest';
import { nearestStep, PEEK_PX } from '../../../src/ui/bottom-sheet.tsx';

describe('a bottom sheet that is let go', () => {
  it('rests at the nearest of its three steps', () => {
    const roomPx = 780;
    expect(nearestStep(PEEK_PX, roomPx)).toBe('peek');
    expect(nearestStep(200, roomPx)).toBe('peek');
    expect(nearestStep(300, roomPx)).toBe('half');
    expect(nearestStep(400, roomPx)).toBe('half');
    expect(nearestStep(700, roomPx)).toBe('full');
  });
});
