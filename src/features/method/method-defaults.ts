import type { Brief } from '../../engine/brief/brief.ts';
import { type BriefField, briefFields } from '../../engine/brief/brief-fields.ts';
import { readBrief } from '../../engine/brief/brief-from-preset.ts';

export interface DefaultRow {
  readonly label: string;
  readonly value: string;
  readonly unit: string;
  readonly source: string;
}

/** The least that a brief must say; all else takes its default. */
const NEEDED = {
  preset: 'defaults',
  phi: 'constant',
  control: 'modulating',
  primaryAir: 'outdoor',
  secondaryAir: 'outdoor',
  clock: 'civil',
  months: 'all',
  weekdays: 'all',
  hours: '0-24',
  caps: {},
  tolerance: {},
  gates: [],
};
const ROOM = { ...NEEDED, dTroomK: 5, limit: { kind: 'fixed', tempC: 26 }, stages: ['direct'] };
const TOWER = {
  ...NEEDED,
  limit: { kind: 'tower', coldC: 27, rangeK: 5, approachK: 4, exchangerK: 0 },
  stages: ['tower'],
};
const GROUPS: readonly BriefField['group'][] = ['air', 'plant', 'water', 'reference'];

/** Every default of a brief that is a number, as the engine reads it, with where it comes from. */
export function methodDefaults(): readonly DefaultRow[] {
  const room = bodyOf(ROOM);
  const tower = bodyOf(TOWER);
  return briefFields.flatMap(({ path, group, label, unit, source, uses }) => {
    if (!GROUPS.includes(group)) return [];
    const found = valueAt(uses.includes('room') ? room : tower, path);
    return typeof found === 'number' ? [{ label, value: String(found), unit, source }] : [];
  });
}

function bodyOf(raw: object): Brief {
  const reading = readBrief(raw);
  if (reading.ok) return reading.brief;
  throw new Error(
    `the least brief has faults: ${reading.faults.map(({ path, message }) => `${path} ${message}`).join('; ')}`,
  );
}

function valueAt(body: unknown, path: string): unknown {
  return path
    .split('.')
    .reduce<unknown>(
      (found, name) => (typeof found === 'object' && found !== null ? Reflect.get(found, name) : null),
      body,
    );
}
