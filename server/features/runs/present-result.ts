import type { ShownRun } from '#contract/runs.ts';
import type { ResolvedClock } from '#engine/clock/resolved-clock.ts';
import type { YearKind } from '#engine/reduction/weather-year.ts';
import type { GateAnswer, RunResult } from '#engine/run/run-result.ts';
import { cautionsOf } from './cautions.ts';
import { dayText, slotEndText, slotStartText } from './local-time-text.ts';

/** A run's figures without its tables. */
export type ResultInShort = Omit<
  RunResult,
  'hourClassCodes' | 'demandByMonthHour' | 'metByMonthHour' | 'supplyCurve' | 'aloneHours'
>;

export interface ResultToShow {
  readonly runId: string;
  readonly clock: ResolvedClock;
  readonly result: ResultInShort;
  readonly zone: string;
  readonly kind: YearKind;
  /** What the brief says with every result. */
  readonly notes: readonly string[];
}

/** The score that stands beside it: a place's, or the year's own. */
export type ScoreToShow = Pick<
  ResultInShort,
  'score' | 'scoreNote' | 'scoreExact' | 'geometricMean' | 'words' | 'parts' | 'verdict'
> & {
  /** Of a site, as they were answered. */
  readonly siteGates: readonly GateAnswer[] | null;
};

export function presentResult(
  { runId, clock, result, zone, kind, notes }: ResultToShow,
  scored: ScoreToShow,
): ShownRun {
  const { score } = scored;
  return {
    runId,
    ledger: { ...result.ledger, classes: { ...result.ledger.classes } },
    verdict: scored.verdict,
    tolerances: [...result.tolerances],
    gates: gatesWith(result.gates, scored.siteGates),
    score,
    scoreNote: scored.scoreNote,
    scoreExact: score === null ? null : scored.scoreExact,
    geometricMean: score === null ? null : scored.geometricMean,
    words: scored.words,
    parts: [...scored.parts],
    worstSpell: presentSpell(clock, result.worstSpell),
    severityKh: result.severityKh,
    water: {
      makeUpLitres: result.water.makeUpLitres,
      litresPerKwh: result.water.litresPerKwh,
      peakDayLitres: result.water.peakDayLitres,
      peakDay: result.water.peakDay === null ? null : dayText(clock, result.water.peakDay),
    },
    electricity: result.electricity === null ? null : { ...result.electricity },
    money: result.money === null ? null : { ...result.money, notes: [...result.money.notes] },
    moneyNote: result.moneyNote,
    carbon: result.carbon,
    cautions: cautionsOf({ kind, zone, notes }),
  };
}

/** What the weather decides, then what a person answered for the site. */
function gatesWith(gates: readonly GateAnswer[], ofSite: readonly GateAnswer[] | null): GateAnswer[] {
  if (ofSite === null) return [...gates];
  const asked = new Set(ofSite.map(({ gate }) => gate));
  return [...gates.filter(({ gate }) => !asked.has(gate)), ...ofSite];
}

function presentSpell(clock: ResolvedClock, spell: ResultInShort['worstSpell']): ShownRun['worstSpell'] {
  if (spell === null) return null;
  return {
    hours: spell.hours,
    start: slotStartText(clock, spell.startSlot),
    end: slotEndText(clock, spell.endSlot),
    severityKh: spell.severityKh,
    worstK: spell.worstK,
    cutAtJoint: spell.cutAtJoint,
  };
}
