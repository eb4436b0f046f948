import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { GapCalendarPicture, gapRuns } from '../../../src/charts/gap-calendar.tsx';
import { gapCalendar } from '../../../src/engine/reduction/gap-calendar.ts';
import { hourFlags } from '../../../src/engine/reduction/hour-flags.ts';

const missing = hourFlags({ dryBulb: 'missing', humidity: 'missing', pressure: 'measured' });
const repaired = hourFlags({ dryBulb: 'repaired', humidity: 'measured', pressure: 'measured' });

/** 3 and 4 January missing from noon to noon, one hour repaired on 5 January, six on 31 December. */
function flagsOfYear(): Uint8Array {
  const flags = new Uint8Array(8760);
  flags.fill(missing, 2 * 24 + 12, 3 * 24 + 12);
  flags[4 * 24] = repaired;
  flags.fill(repaired, 364 * 24, 364 * 24 + 6);
  return flags;
}

describe('the gap calendar', () => {
  it('gathers neighbouring days into one row each, with their hours', () => {
    expect(gapRuns(gapCalendar(flagsOfYear()))).toEqual([
      { firstDay: 2, lastDay: 4, missing: 24, repaired: 1 },
      { firstDay: 364, lastDay: 364, missing: 0, repaired: 6 },
    ]);
  });

  it('has a cell for every day and fills it by the share of its hours', () => {
    const markup = renderToStaticMarkup(<GapCalendarPicture calendar={gapCalendar(flagsOfYear())} label="Gaps." />);
    expect([...markup.matchAll(/fill="none"/g)]).toHaveLength(365);
    // Half a day of 16 units is 8, a quarter 4.
    expect([...markup.matchAll(/height="8" fill="#a8442f"/g)]).toHaveLength(2);
    expect([...markup.matchAll(/height="4" fill="#d79a4a"/g)]).toHaveLength(1);
  });

  it('has nothing to tell of a year that was measured throughout', () => {
    expect(gapRuns(gapCalendar(new Uint8Array(8784)))).toEqual([]);
  });
});
