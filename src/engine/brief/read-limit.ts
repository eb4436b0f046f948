import type { HardLimit, HumidityCaps, Limit, Tolerance } from './brief.ts';
import { DERATE_RULE } from './brief-fields.ts';
import type { Fields, Range } from './fields.ts';

export const ROOM_TEMP: Range = { min: -50, max: 60, unit: '°C' };
const PERCENT: Range = { min: 0, max: 100, over: true, unit: '%' };
const INDEX: Range = { min: 0, max: 120, unit: 'index points' };
const KELVIN: Range = { min: 0.1, max: 30, unit: 'K' };
const HOURS: Range = { min: 0, max: 8784, unit: 'h' };

const KINDS = ['fixed', 'adaptive', 'inlet', 'thi', 'shade-heat', 'tower', 'turbine'] as const;

/** Reads what the brief limits; of a kind that is not known, no other field is judged. */
export function readLimit(limit: Fields): Limit {
  const kind = KINDS.find((each) => each === limit.raw('kind'));
  if (kind === undefined) {
    limit.fault('kind', `what the brief limits is needed, one of ${KINDS.join(', ')}`);
    return { kind: 'fixed', tempC: ROOM_TEMP.min };
  }
  const read = limitOfKind(limit, kind);
  limit.refuseOthers();
  return read;
}

function limitOfKind(limit: Fields, kind: Limit['kind']): Limit {
  switch (kind) {
    case 'fixed':
      return { kind, tempC: limit.number('tempC', ROOM_TEMP) };
    case 'adaptive':
      return {
        kind,
        model: limit.choice('model', ['ashrae55-80', 'ashrae55-90', 'en16798-i', 'en16798-ii', 'en16798-iii']),
        ceilingC: limit.numberOrNull('ceilingC', ROOM_TEMP),
      };
    case 'inlet':
      return { kind, tempC: limit.number('tempC', ROOM_TEMP), ...readDerate(limit) };
    case 'thi':
    case 'shade-heat':
      return { kind, value: limit.number('value', INDEX) };
    case 'tower':
      return {
        kind,
        coldC: limit.number('coldC', { min: 0, max: 60, unit: '°C' }),
        rangeK: limit.number('rangeK', KELVIN, 5),
        approachK: limit.number('approachK', KELVIN, 4),
        exchangerK: limit.number('exchangerK', { min: 0, max: 30, unit: 'K' }, 0),
      };
    case 'turbine':
      return { kind, targetC: limit.number('targetC', ROOM_TEMP), floorC: limit.number('floorC', ROOM_TEMP) };
  }
}

export function readCaps(caps: Fields): HumidityCaps {
  const read = {
    ...(caps.has('roomRhPct') ? { roomRhPct: caps.number('roomRhPct', PERCENT) } : {}),
    ...(caps.has('supplyRhPct') ? { supplyRhPct: caps.number('supplyRhPct', PERCENT) } : {}),
    ...(caps.has('supplyDewPointC')
      ? { supplyDewPointC: caps.number('supplyDewPointC', { min: -40, max: 40, unit: '°C' }) }
      : {}),
  };
  caps.refuseOthers();
  return read;
}

export function readTolerance(tolerance: Fields): Tolerance {
  const read = {
    ...(tolerance.has('sharePct') ? { sharePct: tolerance.number('sharePct', { min: 0, max: 100, unit: '%' }) } : {}),
    ...(tolerance.has('hours') ? { hours: tolerance.number('hours', HOURS) } : {}),
    ...(tolerance.has('spellH') ? { spellH: tolerance.number('spellH', HOURS) } : {}),
  };
  tolerance.refuseOthers();
  return read;
}

export function readHardLimit(hard: Fields): HardLimit {
  const read = {
    tempC: hard.number('tempC', ROOM_TEMP),
    hours: hard.number('hours', { ...HOURS, whole: true }, 0),
    ...readDerate(hard),
  };
  hard.refuseOthers();
  return read;
}

function readDerate(fields: Fields): { derate?: string } {
  if (!fields.has('derate')) return {};
  const derate = fields.text('derate');
  if (derate !== DERATE_RULE) fields.fault('derate', `the one rule known is "${DERATE_RULE}"`);
  return { derate };
}
