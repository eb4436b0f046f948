import type { Brief } from './brief.ts';
import type { BriefFault } from './brief-fault.ts';

/** A fault between fields, with the fields that it lies between. */
interface Contradiction extends BriefFault {
  readonly between: readonly string[];
}

/**
 * What is wrong between fields that are each in their range. A contradiction with a field that is at fault itself is left
 * out: what stands there is a fallback of the reading, not what was written.
 */
export function contradictions(brief: Brief, found: readonly BriefFault[]): BriefFault[] {
  return [
    ...stageFaults(brief),
    ...capFaults(brief),
    ...limitFaults(brief),
    ...listFaults(brief),
    ...faultsOfUse(brief),
  ]
    .filter(
      ({ path, between }) => ![path, ...between].some((field) => found.some((fault) => touches(fault.path, field))),
    )
    .map(({ path, message }) => ({ path, message }));
}

/** Whether a fault lies at the field, in it, or at what holds it. */
function touches(faultPath: string, field: string): boolean {
  const holds = (outer: string, inner: string) => inner.startsWith(`${outer}.`) || inner.startsWith(`${outer}[`);
  return faultPath === field || holds(faultPath, field) || holds(field, faultPath);
}

/** One rule: when it does not hold, its message stands at the path. */
type Rule = readonly [holds: boolean, path: string, message: string, between: readonly string[]];

function broken(rules: readonly Rule[]): Contradiction[] {
  return rules.flatMap(([holds, path, message, between]) => (holds ? [] : [{ path, message, between }]));
}

function stageFaults(brief: Brief): Contradiction[] {
  const { stages, limit, primaryAir } = brief;
  const isTower = limit.kind === 'tower';
  const ofLimit = ['limit.kind'];
  const wetsClinicAir = brief.preset === 'clinic' && (stages.includes('direct') || stages.includes('twostage'));
  return broken([
    [new Set(stages).size === stages.length, 'stages', 'each stage stands once', []],
    [
      stages.includes('tower') === isTower,
      'stages',
      'a tower goes with a limit of cold water, and no other stage does',
      ofLimit,
    ],
    [
      !isTower || !stages.includes('tower') || stages.length === 1,
      'stages',
      'cold water comes from the tower alone',
      ofLimit,
    ],
    [
      (primaryAir === 'return') === (limit.kind === 'inlet'),
      'primaryAir',
      'return air goes with a limit at the inlet of a data hall, outdoor air with every other',
      ofLimit,
    ],
    [
      primaryAir !== 'return' || stages.every((stage) => stage === 'indirect'),
      'stages',
      'return air is cooled by the indirect stage alone',
      ['primaryAir'],
    ],
    [
      limit.kind !== 'turbine' || stages.every((stage) => stage === 'direct'),
      'stages',
      'a turbine inlet is cooled by the direct stage alone',
      ofLimit,
    ],
    [
      !wetsClinicAir || brief.stagesReason !== undefined,
      'stages',
      'in a clinic direct and two-stage cooling need a written reason, in stagesReason',
      ['stagesReason'],
    ],
  ]);
}

function capFaults({ caps, lowerLimits }: Brief): Contradiction[] {
  const names = ['roomRhPct', 'supplyRhPct', 'supplyDewPointC'] as const;
  return names.flatMap((name) => {
    const cap = caps[name];
    const lower = lowerLimits[name];
    if (cap === undefined || lower === undefined || lower < cap) return [];
    const message = `the lower limit, ${lower}, leaves no room under the cap, ${cap}`;
    return [{ path: `lowerLimits.${name}`, message, between: [`caps.${name}`] }];
  });
}

/** The temperature that a brief never lets its room or inlet pass; null where it names none. */
function highestAllowed({ limit }: Brief): { tempC: number; path: string; words: string } | null {
  if (limit.kind === 'fixed' || limit.kind === 'inlet')
    return { tempC: limit.tempC, path: 'limit.tempC', words: 'the limit' };
  if (limit.kind !== 'adaptive' || limit.ceilingC === null) return null;
  return { tempC: limit.ceilingC, path: 'limit.ceilingC', words: 'the ceiling' };
}

function limitFaults(brief: Brief): Contradiction[] {
  const { limit, hardLimits, balanceTempC, startRoomTempC } = brief;
  if (limit.kind === 'turbine') {
    const { floorC, targetC } = limit;
    const message = `the floor, ${floorC} °C, lies over the target, ${targetC} °C`;
    return broken([[floorC <= targetC, 'limit.floorC', message, ['limit.targetC', 'limit.kind']]]);
  }
  const highest = highestAllowed(brief);
  if (highest === null) return [];
  const { tempC, path, words } = highest;
  const between = [path, 'limit.kind'];
  return broken([
    ...(limit.kind === 'adaptive' ? [] : hardLimits).map(
      (hard, index): Rule => [
        hard.tempC >= tempC,
        `hardLimits[${index}].tempC`,
        `the hard limit, ${hard.tempC} °C, lies under the limit, ${tempC} °C`,
        between,
      ],
    ),
    [
      balanceTempC === null || balanceTempC <= tempC,
      'balanceTempC',
      `demand from ${balanceTempC} °C on only, over ${words} of ${tempC} °C itself`,
      between,
    ],
    [
      limit.kind === 'inlet' || startRoomTempC === null || startRoomTempC <= tempC,
      'startRoomTempC',
      `water starts at ${startRoomTempC} °C in the room only, over ${words} of ${tempC} °C itself`,
      between,
    ],
  ]);
}

/** Entries of a list that say the same. */
function listFaults({ hardLimits, gates, reported }: Brief): Contradiction[] {
  const twice = (texts: readonly string[], path: (index: number) => string, message: string): Rule[] =>
    texts.map((text, index): Rule => [texts.indexOf(text) === index, path(index), message, []]);
  const plain = (text: string): string => text.trim().toLowerCase();
  return broken([
    ...twice(
      hardLimits.map(({ tempC, derate = '' }) => `${tempC} ${derate}`),
      (index) => `hardLimits[${index}].tempC`,
      'a hard limit at this temperature stands here already',
    ),
    ...twice(gates.map(plain), (index) => `gates[${index}]`, 'this is asked already'),
    ...twice(reported.map(plain), (index) => `reported[${index}]`, 'this is reported already'),
  ]);
}

/** Fields that a use does not have, or cannot do with. */
function faultsOfUse(brief: Brief): Contradiction[] {
  const { limit } = brief;
  const indexed = limit.kind === 'thi' || limit.kind === 'shade-heat';
  const room = indexed || limit.kind === 'fixed' || limit.kind === 'adaptive';
  const ofLimit = ['limit.kind'];
  return broken([
    [room || brief.dTroomK === 0, 'dTroomK', 'there is no room to warm up here; leave the rise at 0', ofLimit],
    [
      limit.kind !== 'inlet' || brief.dwRoomKgKg === 0,
      'dwRoomKgKg',
      'the equipment of a hall gives off no moisture',
      ofLimit,
    ],
    [room || brief.phi === 'constant', 'phi', 'the load of halls, towers and turbines is constant', ofLimit],
    [
      brief.phi === 'constant' || !room || brief.balanceTempC !== null,
      'balanceTempC',
      'a load that grows from the balance temperature on needs one',
      ['phi', 'limit.kind'],
    ],
    [
      brief.secondaryAir === 'outdoor' || (room && !indexed),
      'secondaryAir',
      indexed
        ? 'room exhaust needs a temperature that the room is held at, which an index does not set'
        : 'room exhaust needs a room that outdoor air serves',
      ofLimit,
    ],
    [!brief.basinHeat || limit.kind === 'tower', 'basinHeat', 'a heated basin goes with a cooling tower', ofLimit],
    [
      !indexed || brief.hardLimits.length === 0,
      'hardLimits',
      'a hard limit is a temperature, and an index holds the room at none',
      ofLimit,
    ],
  ]);
}
