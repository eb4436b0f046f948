import { describe, expect, it } from 'vitest';
import { paths, safeReturn } from '../../../src/lib/paths.ts';

describe('the way back after signing in', () => {
  it('leads to where one was', () => {
    expect(safeReturn('/teams/1/weather?after=x')).toBe('/teams/1/weather?after=x');
  });

  it('never leads to another host, nor round in a circle', () => {
    for (const from of [
      'https://example.org/',
      '//example.org',
      '/\\example.org',
      'javascript:alert(1)',
      '',
      '/sign-in',
    ]) {
      expect(safeReturn(from), from).toBe('/');
    }
    expect(safeReturn(null)).toBe('/');
  });

  it('is carried in the address of the sign-in page, escaped', () => {
    expect(paths.signIn.to('/teams/1/weather?after=a&b')).toBe('/sign-in?from=%2Fteams%2F1%2Fweather%3Fafter%3Da%26b');
    expect(paths.signIn.to('/')).toBe('/sign-in');
  });
});
