import { describe, expect, test } from 'vitest';
import { countOpen } from '#engine/clock/open-schedule.ts';
import { worstSpell } from '#engine/hour-classes/worst-spell.ts';

/** One letter a slot: u unmet, m met or idle, c closed; a bar is a month joint. */
function spellOf(text: string) {
  const letters = [...text].filter((letter) => letter !== '|');
  const periods = [...text].flatMap((letter, place) =>
    letter === '|' ? [] : [text.slice(0, place).split('|').length],
  );
  const open = Uint8Array.from(letters, (letter) => (letter === 'c' ? 0 : 1));
  const hours = letters.flatMap((letter, slot) =>
    letter === 'c' ? [] : [{ slot, met: letter === 'm', lackK: slot + 1 }],
  );
  return worstSpell(
    {
      count: hours.length,
      slot: Uint16Array.from(hours, ({ slot }) => slot),
      met: Uint8Array.from(hours, ({ met }) => (met ? 1 : 0)),
      shortfallK: Float64Array.from(hours, ({ met, lackK }) => (met ? 0 : lackK)),
    },
    { openBefore: countOpen(open).openBefore, periodOf: Uint8Array.from(periods) },
  );
}

describe('the worst spell', () => {
  test('is the longest run of unmet demand hours, with its K h and worst K', () => {
    expect(spellOf('mummmmmmmuuum')).toEqual({
      hours: 3,
      startSlot: 9,
      endSlot: 11,
      severityKh: 10 + 11 + 12,
      worstK: 12,
      cutAtJoint: false,
    });
  });

  test('bridges 6 other hours, uncounted, and not 7', () => {
    expect(spellOf('uummmmmmu')).toMatchObject({ hours: 3, startSlot: 0, endSlot: 8 });
    expect(spellOf('uummmmmmmu')).toMatchObject({ hours: 2, startSlot: 0, endSlot: 1 });
  });

  test('takes closed hours out before it counts, so that nights neither count nor break it', () => {
    expect(spellOf(`uu${'c'.repeat(14)}uu${'c'.repeat(14)}u`)).toMatchObject({ hours: 5, startSlot: 0, endSlot: 32 });
    expect(spellOf(`ummm${'c'.repeat(14)}mmmu`)).toMatchObject({ hours: 2 });
    expect(spellOf(`ummmm${'c'.repeat(14)}mmmu`)).toMatchObject({ hours: 1 });
  });

  test('ends at a month joint, and both sides say so when it would go on', () => {
    expect(spellOf('uuu|uu')).toMatchObject({ hours: 3, endSlot: 2, cutAtJoint: true });
    expect(spellOf('uu|muuu')).toMatchObject({ hours: 3, startSlot: 3, cutAtJoint: true });
    expect(spellOf('uuu|mmmmmmmu')).toMatchObject({ hours: 3, cutAtJoint: false });
    expect(spellOf('uuumm|')).toMatchObject({ hours: 3, cutAtJoint: false });
  });

  test('is the first of equals, and none when every hour is met', () => {
    expect(spellOf('uummmmmmmuu')).toMatchObject({ hours: 2, startSlot: 0 });
    expect(spellOf('mmcc')).toBeNull();
  });
});
