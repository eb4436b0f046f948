/** Why an hour has its class, in one plain sentence (method 5). */
import type { Brief } from '../brief/brief.ts';
import { hundredths } from '../conventions.ts';
import type { HourJudgement } from '../hour-classes/demand-hour.ts';
import { isIndexLimit } from '../hour-classes/index-limit.ts';
import type { JudgedHour } from './judged-year.ts';

const STAGE_WORDS: Readonly<Record<NonNullable<HourJudgement['running']>, string>> = {
  air: 'Outdoor air',
  direct: 'Direct cooling',
  indirect: 'Indirect cooling',
  dewpoint: 'Dew-point cooling',
  twostage: 'Two-stage cooling',
  tower: 'The tower',
};

/** A slot without demand. @param dryBulbC °C, NaN where not known */
export function reasonWithoutDemand(
  hourClass: 'closed' | 'missing' | 'idle',
  hour: { dryBulbC: number; humidityRatio: number; pressurePa: number; idleUpToC: number | null },
): string {
  if (hourClass === 'closed') return 'Outside the schedule.';
  if (hourClass === 'idle') return `No cooling is needed at or under ${hour.idleUpToC} °C outdoors.`;
  const unknown = [
    Number.isNaN(hour.dryBulbC) ? ['dry bulb'] : [],
    Number.isNaN(hour.humidityRatio) ? ['humidity'] : [],
    Number.isNaN(hour.pressurePa) ? ['pressure'] : [],
  ].flat();
  return `Not known: ${unknown.join(', ')}.`;
}

/** A demand hour. @param input.depressionK wet-bulb depression outdoors, K */
export function reasonOfDemand(input: { judged: JudgedHour; brief: Brief; depressionK: number }): string {
  const { judged, brief, depressionK } = input;
  const { judgement, hour } = judged;
  const { hourClass, met } = judgement;
  const lockout = hourClass === 'frozen' ? `${frozenWords(brief, met)} ` : '';
  if (met) return `${lockout}${metWords(judgement, { aim: aimWords(judged, brief), brief })}`;
  if (hourClass === 'damp') return dampWords(judgement);
  const short = `${rounded(judgement.shortfallK)} ${isIndexLimit(brief.limit) ? 'points' : 'K'} over ${aimWords(judged, brief)}`;
  if (hourClass === 'short') return `${supplierWords(judgement, brief)} helps but stays ${short}.`;
  if (hourClass === 'frozen') return `${lockout}What is left stays ${short}.`;
  return `${whyNoStage({ brief, depressionK, outdoorC: hour.outdoor.dryBulbC })} What is reached stays ${short}.`;
}

function metWords(judgement: HourJudgement, { aim, brief }: { aim: string; brief: Brief }): string {
  const wetting = judgement.supply.share > 0 && judgement.running !== 'tower' ? wettingWords(judgement) : '';
  return `${supplierWords(judgement, brief)}${wetting} reaches ${aim}.`;
}

function wettingWords({ supply }: HourJudgement): string {
  return ` at ${Math.round(100 * supply.share)} % of full wetting`;
}

/** Of a hall the exchanger, dry or wet; else the stage that runs. */
function supplierWords({ running }: HourJudgement, { limit }: Brief): string {
  if (running === null) return 'The drained tower';
  if (limit.kind !== 'inlet') return STAGE_WORDS[running];
  return running === 'air' ? 'The dry exchanger' : 'The wetted exchanger';
}

/** What is asked: a supply temperature, cold water, or an index. */
function aimWords({ hour }: JudgedHour, { limit }: Brief): string {
  switch (limit.kind) {
    case 'thi':
    case 'shade-heat':
      return `the index of ${limit.value} points`;
    case 'tower':
      return `water of ${rounded(limit.coldC)} °C`;
    case 'turbine':
      return `an inlet of ${rounded(limit.targetC)} °C`;
    default:
      return `a supply of ${rounded(hour.supplyAimC)} °C`;
  }
}

function dampWords({ dampBy }: HourJudgement): string {
  return dampBy === 'outside'
    ? 'The moisture of outdoor air alone breaks a humidity cap where the room is to be held.'
    : 'Cold enough only by more moisture than the humidity caps allow.';
}

function frozenWords({ freezeLockoutC, basinHeat, limit }: Brief, met: boolean): string {
  const kept = limit.kind === 'tower' && basinHeat && met;
  return `At or under the freeze lockout of ${freezeLockoutC} °C: ${kept ? 'the basin is heated.' : 'wet parts are drained.'}`;
}

function whyNoStage(input: { brief: Brief; depressionK: number; outdoorC: number }): string {
  const { brief, depressionK, outdoorC } = input;
  const { limit, cutInDepressionK } = brief;
  if (limit.kind === 'tower') return 'The tower would give no water under that which comes back.';
  const bound = limit.kind !== 'inlet';
  const cutOut = bound && hundredths(outdoorC) - hundredths(outdoorC - depressionK) < hundredths(cutInDepressionK);
  if (brief.stages.length === 0) return 'The brief has no wet stage.';
  if (cutOut) return `No wet stage starts: the depression of ${rounded(depressionK)} K is under ${cutInDepressionK} K.`;
  return `No permitted stage lowers what is supplied by 1 ${isIndexLimit(limit) ? 'point' : 'K'} within the caps.`;
}

function rounded(value: number): string {
  return (hundredths(value) / 100).toFixed(2);
}
