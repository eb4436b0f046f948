/**
 * Reads a brief from a preset, a saved version or whatever else claims to be one. Field names and units are those of
 * data/presets; a field left out takes the default of method 3, the score components those of method 7.3.
 */
import type { Brief, Limit } from './brief.ts';
import { type BriefFault, BriefFaultsError } from './brief-fault.ts';
import { contradictions } from './contradictions.ts';
import { Fields, type Range } from './fields.ts';
import { ROOM_TEMP, readCaps, readHardLimit, readLimit, readTolerance } from './read-limit.ts';
import { readMoney } from './read-money.ts';
import { readSchedule } from './read-schedule.ts';
import { readScore } from './read-score.ts';
import { faultOfReported } from './reported.ts';

export type BriefReading =
  | { readonly ok: true; readonly brief: Brief }
  | { readonly ok: false; readonly faults: readonly BriefFault[] };

const EFFECTIVENESS = { min: 0, max: 1 };
const FAN = { min: 0, max: 10, unit: 'W per L/s' };
const PERCENT = { min: 0, max: 100, unit: '%' };
/** Air that warms up by less would be without end. */
const LEAST_RISE_K = 0.1;
/** More heat than this for each part of work and the figures of the reference say nothing. */
const LEAST_COP = 0.1;
const LONGEST_ENTRY = 120;

/**
 * Reads a brief.
 * @throws BriefFaultsError with every fault, each located by path
 */
export function briefFromPreset(raw: unknown): Brief {
  const reading = readBrief(raw);
  if (!reading.ok) throw new BriefFaultsError(reading.faults);
  return reading.brief;
}

/** Reads a brief, or answers every fault at once, each located by path. */
export function readBrief(raw: unknown): BriefReading {
  const faults: BriefFault[] = [];
  const fields = new Fields(raw, '', faults);
  const limit = readLimit(fields.group('limit'));
  const brief: Brief = {
    ...readNames(fields),
    ...readAirSide(fields, limit),
    ...readEquipment(fields, limit),
    ...readSchedule(fields),
    ...readRequirement(fields),
    ...readMoney(fields),
    ...(fields.has('stagesReason') ? { stagesReason: fields.text('stagesReason') } : {}),
    limit,
  };
  fields.refuseOthers();
  faults.push(...contradictions(brief, faults));
  return faults.length === 0 ? { ok: true, brief } : { ok: false, faults };
}

/** A saved version names its preset; a preset in the presets file is named by its `id`. */
function readNames(fields: Fields): Pick<Brief, 'preset' | 'source'> {
  return {
    preset: fields.has('preset') ? fields.text('preset') : fields.text('id'),
    source: fields.raw('source') === '' ? '' : fields.text('source', ''),
  };
}

function readAirSide(fields: Fields, limit: Limit) {
  const roomHeated = limit.kind !== 'inlet' && limit.kind !== 'tower' && limit.kind !== 'turbine';
  const rise = { min: roomHeated ? LEAST_RISE_K : 0, max: 40, unit: 'K' };
  const itRise = { min: LEAST_RISE_K, max: 60, unit: 'K' };
  return {
    phi: fields.choice('phi', ['constant', 'linear']),
    control: fields.choice('control', ['modulating', 'on-off']),
    primaryAir: fields.choice('primaryAir', ['outdoor', 'return']),
    secondaryAir: fields.choice('secondaryAir', ['outdoor', 'exhaust']),
    effDirect: fields.number('effDirect', EFFECTIVENESS, 0.85),
    effIndirect: fields.number('effIndirect', EFFECTIVENESS, 0.65),
    effDewPoint: fields.number('effDewPoint', EFFECTIVENESS, 0.65),
    effExchanger: fields.number('effExchanger', EFFECTIVENESS, 0.65),
    cutInDepressionK: fields.number('cutInDepressionK', { min: 0, max: 40, unit: 'K' }, 2),
    startRoomTempC: fields.numberOrNull('startRoomTempC', ROOM_TEMP),
    maxOutdoorRhPct: fields.numberOrNull('maxOutdoorRhPct', PERCENT),
    freezeLockoutC: fields.number('freezeLockoutC', { min: -50, max: 30, unit: '°C' }, 2),
    basinHeat: fields.flag('basinHeat', false),
    balanceTempC: roomHeated ? readRoomBalance(fields) : fields.numberOrNull('balanceTempC', ROOM_TEMP),
    dwRoomKgKg: fields.number('dwRoomKgKg', { min: 0, max: 0.02, unit: 'kg/kg' }, 0),
    dTroomK: fields.number('dTroomK', rise, roomHeated ? undefined : 0),
    dTitK: limit.kind === 'inlet' ? fields.number('dTitK', itRise) : fields.numberOrNull('dTitK', itRise),
  };
}

/** A room without a balance temperature, said as null, has demand in every hour of its schedule. */
function readRoomBalance(fields: Fields): number | null {
  return fields.raw('balanceTempC') === null ? null : fields.number('balanceTempC', ROOM_TEMP, 14);
}

function readEquipment(fields: Fields, limit: Limit) {
  const tower = limit.kind === 'tower';
  const fans = fields.group('fanWPerLs');
  const reference = fields.group('reference');
  const ofTower = (name: string, range: Range, byDefault: number): number | null =>
    tower ? fields.number(name, range, byDefault) : fields.numberOrNull(name, range);
  const read = {
    fanWPerLs: {
      air: fans.number('air', FAN, 0.6),
      direct: fans.number('direct', FAN, 0.8),
      indirect: fans.number('indirect', FAN, 1.3),
      dewpoint: fans.number('dewpoint', FAN, 1.8),
      twostage: fans.number('twostage', FAN, 1.5),
      returnAir: fans.number('returnAir', FAN, 0.8),
    },
    pumpKwPerKw: fields.number('pumpKwPerKw', { min: 0, max: 1, unit: 'kW per kW' }, 0.02),
    k: fields.number('k', { min: 0.5, max: 2 }, 1.05),
    cycles: fields.number('cycles', { min: 1, max: 20, over: true, unit: 'cycles of concentration' }, 4),
    driftPctOfCirculation: fields.number('driftPctOfCirculation', { min: 0, max: 1, unit: '%' }, tower ? 0.005 : 0),
    reference: {
      cop: reference.number('cop', { min: LEAST_COP, max: 20 }, 3),
      economy: reference.flag('economy', true),
    },
    towerFanPumpWPerKw: ofTower('towerFanPumpWPerKw', { min: 0, max: 500, unit: 'W per kW' }, 25),
    towerLatentShare: ofTower('towerLatentShare', { min: 0, max: 1 }, 0.9),
  };
  fans.refuseOthers();
  reference.refuseOthers();
  return read;
}

function readRequirement(fields: Fields) {
  const text = (entry: unknown, path: string): string => {
    if (typeof entry === 'string' && entry.trim() !== '' && entry.length <= LONGEST_ENTRY) return entry;
    fields.fault(path, `a text of at most ${LONGEST_ENTRY} characters is needed`);
    return '';
  };
  const reported = (entry: unknown, path: string): string => {
    const read = text(entry, path);
    const fault = faultOfReported(read);
    if (fault !== null) fields.fault(path, fault);
    return read;
  };
  const stages = fields.list('stages', (stage) => stageOf(stage, fields));
  return {
    caps: readCaps(fields.group('caps')),
    lowerLimits: readCaps(fields.group('lowerLimits')),
    hardLimits: fields.list('hardLimits', (hard, path) => readHardLimit(fields.entry(hard, path))),
    reported: fields.list('reported', reported),
    stages,
    tolerance: readTolerance(fields.group('tolerance')),
    gates: fields.list('gates', text),
    score: readScore(fields),
  };
}

function stageOf(stage: unknown, fields: Fields): Brief['stages'][number] {
  const words = ['direct', 'indirect', 'dewpoint', 'twostage', 'tower'] as const;
  const word = words.find((each) => each === stage);
  if (word === undefined) fields.fault('stages', `one of ${words.join(', ')} is needed, not ${JSON.stringify(stage)}`);
  return word ?? 'direct';
}
