/**
 * What would make a place pass (method 7.2): single changes of a brief, each lever moved from where it stands towards a milder requirement
 * or a better plant, step by step, as far as its bound. Steps and bounds are ours.
 */
import type { Brief, HumidityCaps, Limit, Stage } from '../brief/brief.ts';
import { kindOfUse } from '../brief/brief-fields.ts';
import { readBrief } from '../brief/brief-from-preset.ts';
import { isIndexLimit } from '../hour-classes/index-limit.ts';

export interface TurningLever {
  readonly lever: 'set-point' | 'humidity cap' | 'effectiveness' | 'stage';
  /** Where in the brief, such as `caps.roomRhPct`. */
  readonly path: string;
  readonly label: string;
  readonly unit: string;
  /** null for a stage. */
  readonly from: number | null;
  /** Values in the order of the change, the nearest first; one null for a stage. */
  readonly values: readonly (number | null)[];
  /** What the lever would add. */
  readonly stage: Stage | null;
  /** Width of the doubt of method 7.6 that changes are measured in; null for a stage. */
  readonly width: number | null;
  readonly briefAt: (value: number | null) => Brief;
}

const SET_POINT = { step: 0.1, most: 5, width: 1 };
const CAP_PCT = { step: 1, most: 100, width: 5 };
const CAP_DEW_POINT = { step: 0.1, most: 5, width: 1 };
const DIRECT_WIDTH = 0.05;
const INDIRECT_WIDTH = 0.1;
const EFFECTIVENESS_STEP = 0.01;
/** What plant on the market reaches (common practice). */
const BEST = { effDirect: 0.95, effIndirect: 0.85, effDewPoint: 0.85, effExchanger: 0.9 } as const;
const ROOM_STAGES: readonly Stage[] = ['direct', 'indirect', 'dewpoint', 'twostage'];
const STAGE_NAMES: Readonly<Record<Stage, string>> = {
  direct: 'Direct stage',
  indirect: 'Indirect stage',
  dewpoint: 'Dew-point stage',
  twostage: 'Two-stage',
  tower: 'Tower',
};

/** The levers that a brief has; one whose every value contradicts the rest of the brief is left out. */
export function turningLevers(brief: Brief): readonly TurningLever[] {
  const levers = [...setPointLevers(brief), ...capLevers(brief), ...effectivenessLevers(brief), ...stageLevers(brief)];
  return levers
    .map((lever) => ({ ...lever, values: lever.values.filter((value) => readBrief(lever.briefAt(value)).ok) }))
    .filter(({ values }) => values.length > 0);
}

/**
 * The nearest value of a lever at which the verdict turns; undefined when none does. Under modulating control and a limit of temperature a
 * milder value never makes worse (method 5), so the values are halved; else each is tried in turn.
 */
export function nearestTurning(
  lever: TurningLever,
  passes: (brief: Brief) => boolean,
): { readonly value: number | null } | undefined {
  const { values, briefAt } = lever;
  const holds = (at: number): boolean => passes(briefAt(values[at] ?? null));
  const { control, limit } = briefAt(values[0] ?? null);
  if (control !== 'modulating' || isIndexLimit(limit)) {
    const at = values.findIndex((_value, place) => holds(place));
    return at < 0 ? undefined : { value: values[at] ?? null };
  }
  let passing = values.length - 1;
  if (!holds(passing)) return undefined;
  let failing = -1;
  while (passing - failing > 1) {
    const middle = Math.floor((passing + failing) / 2);
    if (holds(middle)) passing = middle;
    else failing = middle;
  }
  return { value: values[passing] ?? null };
}

/** Values at equal steps, without the noise of binary fractions. */
function stepped(from: number, { step, until }: { step: number; until: number }): number[] {
  const count = Math.floor((until - from) / step + 1e-9);
  const perUnit = Math.round(1 / step);
  return Array.from(
    { length: Math.max(count, 0) },
    (_none, at) => Math.round((from + (at + 1) * step) * perUnit) / perUnit,
  );
}

type NumberLever = { path: string; label: string; unit: string; width: number };

function setPointLevers(brief: Brief): TurningLever[] {
  const { limit } = brief;
  const lever = (from: number, { path, label, unit }: Omit<NumberLever, 'width'>, at: (to: number) => Limit) => [
    {
      ...{ lever: 'set-point' as const, path, label, unit, from, stage: null, width: SET_POINT.width },
      values: stepped(from, { step: SET_POINT.step, until: from + SET_POINT.most }),
      briefAt: (value: number | null): Brief => ({ ...brief, limit: at(value ?? from) }),
    },
  ];
  const room = { path: 'limit.tempC', label: 'Set-point', unit: '°C' };
  switch (limit.kind) {
    case 'fixed':
      return lever(limit.tempC, room, (tempC) => ({ ...limit, tempC }));
    case 'inlet':
      return lever(limit.tempC, { ...room, label: 'Inlet temperature' }, (tempC) => ({ ...limit, tempC }));
    case 'tower':
      return lever(limit.coldC, { path: 'limit.coldC', label: 'Cold water', unit: '°C' }, (coldC) => ({
        ...limit,
        coldC,
      }));
    case 'turbine':
      return lever(limit.targetC, { path: 'limit.targetC', label: 'Inlet target', unit: '°C' }, (targetC) => ({
        ...limit,
        targetC,
      }));
    case 'thi':
    case 'shade-heat':
      return lever(limit.value, { path: 'limit.value', label: 'Limit of the index', unit: 'points' }, (value) => ({
        ...limit,
        value,
      }));
    // It follows the weather.
    case 'adaptive':
      return [];
  }
}

function capLevers(brief: Brief): TurningLever[] {
  const lever = (
    name: keyof HumidityCaps,
    label: string,
    by: { unit: string; step: number; until: number; width: number },
  ) => {
    const from = brief.caps[name];
    if (from === undefined) return [];
    const { unit, step, until, width } = by;
    return [
      {
        ...{ lever: 'humidity cap' as const, path: `caps.${name}`, label, unit, from, stage: null, width },
        values: stepped(from, { step, until }),
        briefAt: (value: number | null): Brief => ({ ...brief, caps: { ...brief.caps, [name]: value ?? from } }),
      },
    ];
  };
  const pct = { unit: '% RH', step: CAP_PCT.step, until: CAP_PCT.most, width: CAP_PCT.width };
  const { step, most, width } = CAP_DEW_POINT;
  const until = (brief.caps.supplyDewPointC ?? 0) + most;
  return [
    ...lever('roomRhPct', 'Room humidity, at most', pct),
    ...lever('supplyRhPct', 'Supply humidity, at most', pct),
    ...lever('supplyDewPointC', 'Supply dew point, at most', { unit: '°C', step, until, width }),
  ];
}

function effectivenessLevers(brief: Brief): TurningLever[] {
  const has = (...stages: readonly Stage[]): boolean => stages.some((stage) => brief.stages.includes(stage));
  const returnAir = brief.primaryAir === 'return';
  const lever = (
    name: keyof typeof BEST,
    { label, width, counts }: { label: string; width: number; counts: boolean },
  ) => {
    const from = brief[name];
    if (!counts) return [];
    return [
      {
        ...{ lever: 'effectiveness' as const, path: name, label, unit: '', from, stage: null, width },
        values: stepped(from, { step: EFFECTIVENESS_STEP, until: BEST[name] }),
        briefAt: (value: number | null): Brief => ({ ...brief, [name]: value ?? from }),
      },
    ];
  };
  return [
    ...lever('effDirect', { label: 'Direct effectiveness', width: DIRECT_WIDTH, counts: has('direct', 'twostage') }),
    ...lever('effIndirect', {
      label: 'Indirect effectiveness',
      width: INDIRECT_WIDTH,
      counts: has('indirect', 'twostage'),
    }),
    ...lever('effDewPoint', { label: 'Dew-point effectiveness', width: INDIRECT_WIDTH, counts: has('dewpoint') }),
    ...lever('effExchanger', { label: 'Exchanger effectiveness', width: INDIRECT_WIDTH, counts: returnAir }),
  ];
}

/** A stage more, in the order of least electricity (method 3). */
function stageLevers(brief: Brief): TurningLever[] {
  const use = kindOfUse(brief.limit);
  const possible: readonly Stage[] =
    use === 'room' || use === 'index'
      ? ROOM_STAGES
      : use === 'hall'
        ? ['indirect']
        : use === 'turbine'
          ? ['direct']
          : ['tower'];
  return possible
    .filter((stage) => !brief.stages.includes(stage))
    .map((stage) => ({
      ...{
        lever: 'stage' as const,
        path: 'stages',
        label: STAGE_NAMES[stage],
        unit: '',
        from: null,
        stage,
        width: null,
      },
      values: [null],
      briefAt: (): Brief => ({ ...brief, stages: withStage(brief.stages, stage) }),
    }));
}

/** Before the first of those there that comes later in the order; the order of the others is the brief's own. */
function withStage(stages: readonly Stage[], added: Stage): readonly Stage[] {
  const rank = (stage: Stage): number => ROOM_STAGES.indexOf(stage);
  const at = stages.findIndex((stage) => rank(stage) > rank(added));
  return at < 0 ? [...stages, added] : [...stages.slice(0, at), added, ...stages.slice(at)];
}
