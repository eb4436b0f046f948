import { judgeYear } from '#engine/run/judge-year.ts';
import type { PreviewedYear, PreviewTask } from '../../jobs/web-task.ts';

/** Judges one year by a draft, by the same function that a saved run is made by; in a thread of the web process. */
export function previewYear(task: PreviewTask): PreviewedYear {
  const { ledger, verdict, tolerances, gates, score, scoreNote, words, parts, hourClassCodes } = judgeYear(task);
  return { ledger, verdict, tolerances, gates, score, scoreNote, words, parts, hourClassCodes };
}
