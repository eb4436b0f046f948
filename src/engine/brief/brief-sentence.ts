import type { Brief, HumidityCaps, Limit, Stage, Tolerance } from './brief.ts';
import { parseHours } from './schedule-hours.ts';

const MODELS: Readonly<Record<Extract<Limit, { kind: 'adaptive' }>['model'], string>> = {
  'ashrae55-80': 'ASHRAE 55 at 80 % acceptability',
  'ashrae55-90': 'ASHRAE 55 at 90 % acceptability',
  'en16798-i': 'EN 16798-1 category I',
  'en16798-ii': 'EN 16798-1 category II',
  'en16798-iii': 'EN 16798-1 category III',
};
const STAGES: Readonly<Record<Stage, string>> = {
  direct: 'direct',
  indirect: 'indirect',
  dewpoint: 'dew-point',
  twostage: 'two-stage',
  tower: 'cooling tower',
};
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/** The requirement in one plain sentence, without a full stop. */
export function briefSentence(brief: Brief): string {
  return [
    limitWords(brief.limit),
    ...capWords(brief),
    scheduleWords(brief),
    stageWords(brief.stages),
    ...toleranceWords(brief.tolerance),
    ...brief.hardLimits.map(({ tempC, hours }) => `${hours === 0 ? 'no hour' : `at most ${hours} h`} over ${tempC} °C`),
  ].join(', ');
}

function limitWords(limit: Limit): string {
  switch (limit.kind) {
    case 'fixed':
      return `${limit.tempC} °C room`;
    case 'adaptive':
      return `room within ${MODELS[limit.model]}${limit.ceilingC === null ? '' : `, never over ${limit.ceilingC} °C`}`;
    case 'inlet':
      return `${limit.tempC} °C at the inlet of the equipment`;
    case 'thi':
      return `temperature-humidity index of at most ${limit.value}`;
    case 'shade-heat':
      return `shade heat figure of at most ${limit.value}`;
    case 'tower':
      return `process water at ${limit.coldC} °C`;
    case 'turbine':
      return `turbine inlet at ${limit.targetC} °C`;
  }
}

/** A hall's caps are named as what they are: tested by no hour. */
function capWords({ caps, limit }: Pick<Brief, 'caps' | 'limit'>): string[] {
  const words = testedCapWords(caps);
  const last = words.pop();
  if (last === undefined) return [];
  return [...words, limit.kind === 'inlet' ? `${last} (to be held by the hall’s own humidity control)` : last];
}

function testedCapWords({ roomRhPct, supplyRhPct, supplyDewPointC }: HumidityCaps): string[] {
  return [
    ...(roomRhPct === undefined ? [] : [`at most ${roomRhPct} % relative humidity`]),
    ...(supplyRhPct === undefined ? [] : [`supply at most ${supplyRhPct} % relative humidity`]),
    ...(supplyDewPointC === undefined ? [] : [`supply dew point at most ${supplyDewPointC} °C`]),
  ];
}

function scheduleWords({ months, weekdays, hours }: Brief): string {
  const days = weekdays === 'mon-fri' ? 'Monday to Friday' : 'every day';
  const season = months === 'all' ? '' : ` in ${months.map((month) => MONTHS[month - 1]).join(', ')}`;
  const opening = parseHours(hours);
  if (opening === 'daylight') return `in daylight ${days}${season}`;
  if (opening === null || (opening.opening === 0 && opening.closing === 24))
    return `open day and night ${days}${season}`;
  return `open ${twoDigits(opening.opening)} to ${twoDigits(opening.closing)} ${days}${season}`;
}

function stageWords(stages: readonly Stage[]): string {
  const words = stages.map((stage) => STAGES[stage]);
  const last = words.at(-1);
  if (last === undefined) return 'outdoor air alone';
  return words.length === 1 ? last : `${words.slice(0, -1).join(', ')} and ${last}`;
}

function toleranceWords({ sharePct, hours, spellH }: Tolerance): string[] {
  return [
    ...(sharePct === undefined ? [] : [`at most ${sharePct} % of demand hours unmet`]),
    ...(hours === undefined ? [] : [`at most ${hours} h unmet`]),
    ...(spellH === undefined ? [] : [`no spell over ${spellH} h`]),
  ];
}

function twoDigits(hour: number): string {
  return String(hour).padStart(2, '0');
}
