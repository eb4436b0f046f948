import type { Brief } from '../brief/brief.ts';
import type { GateAnswer } from '../run/run-result.ts';
import { askedGates } from './gates.ts';

export interface GatedScore {
  readonly score: number | null;
  readonly scoreNote: string | null;
  readonly words: string | null;
  readonly range: { readonly low: number; readonly high: number } | null;
}

/**
 * The gates that a brief asks of a site as a person answered them (method 7.1); one without an answer is not known. Answers to gates that
 * this brief does not ask stay out.
 */
export function siteGates(brief: Pick<Brief, 'gates'>, answers: readonly GateAnswer[]): readonly GateAnswer[] {
  const asked = askedGates(brief);
  if (answers.length === 0) return asked;
  const answered = new Map(answers.map((each) => [each.gate, each]));
  return asked.map((each) => answered.get(each.gate) ?? each);
}

/** Gates that fail, each with its reason: "water available: the borehole is dry". */
export function failingSiteGates(gates: readonly GateAnswer[]): readonly string[] {
  return gates.filter(({ answer }) => answer === 'fail').map(({ gate, note }) => `${gate}: ${note}`);
}

const EXCLUDED = 'excluded: ';

/** A failed gate prints "excluded: reason" and no number, beside whatever the weather excludes (method 7.1). */
export function withSiteGates<Figures extends GatedScore>(figures: Figures, gates: readonly GateAnswer[]): Figures {
  const failing = failingSiteGates(gates);
  if (failing.length === 0) return figures;
  const already = figures.scoreNote?.startsWith(EXCLUDED) ? [figures.scoreNote.slice(EXCLUDED.length)] : [];
  const scoreNote = `${EXCLUDED}${[...already, ...failing].join('; ')}`;
  return { ...figures, score: null, words: null, range: null, scoreNote };
}
