import type { SiteWater } from '../../contract/site-water.ts';
import { MOST_CYCLES, waterCycles } from '../../engine/sites/water-cycles.ts';
import { list, number, percent, withUnit } from '../../lib/format.ts';

/** How often the water may be concentrated, ion by ion, and what limits it. */
export function WaterCyclesTable({ water }: { water: SiteWater }) {
  const { cycles, limiting, unknown, bleedShare, allowed } = waterCycles({
    hardness: water.hardnessMgL,
    alkalinity: water.alkalinityMgL,
    silica: water.silicaMgL,
    'dissolved solids': water.dissolvedSolidsMgL,
  });
  if (allowed.length === 0) {
    return (
      <p className="text-soft">
        Nothing of the water is known yet, so the brief’s own cycles of concentration hold, 4 unless it says otherwise.
      </p>
    );
  }
  return (
    <div className="grid gap-2">
      <p role="status" className="max-w-[70ch]">
        {cycles === null ? (
          <>
            <strong>Not to be concentrated:</strong> {limiting} is over its limit in the untreated make-up water. It
            needs treatment, or another source.
          </>
        ) : (
          <>
            <strong>{number(cycles, 1)} cycles of concentration</strong>,{' '}
            {limiting === null
              ? `the customary most (${MOST_CYCLES}), as little is saved beyond`
              : `limited by ${limiting}`}
            : for every litre evaporated {number(bleedShare ?? 0, 2)} L of bleed, {percent(100 * (bleedShare ?? 0), 0)}{' '}
            on top.
          </>
        )}{' '}
        {unknown.length > 0 ? `Not known, and perhaps less: ${list(unknown)}.` : ''}
      </p>
      <table className="ruled max-w-[44rem]">
        <caption className="sr-only">Cycles that each ion allows</caption>
        <thead>
          <tr>
            <th scope="col">Ion</th>
            <th scope="col" className="figure">
              Make-up
            </th>
            <th scope="col" className="figure">
              Limit
            </th>
            <th scope="col" className="figure">
              Cycles
            </th>
            <th scope="col" className="pl-4">
              Where the limit comes from
            </th>
          </tr>
        </thead>
        <tbody>
          {allowed.map(({ ion, makeUpMgL, limitMgL, cycles: each, source }) => (
            <tr key={ion}>
              <th scope="row" className={ion === limiting ? 'font-semibold' : ''}>
                {ion.charAt(0).toUpperCase() + ion.slice(1)}
              </th>
              <td className="figure">{withUnit(makeUpMgL, 'mg/L')}</td>
              <td className="figure">{withUnit(limitMgL, 'mg/L')}</td>
              <td className="figure">{number(each, 1)}</td>
              <td className="pl-4 text-fine text-soft">{source}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}
