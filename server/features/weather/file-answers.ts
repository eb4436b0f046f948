import type { RuleName } from '#engine/weather-files/quality/quality-options.ts';
import type { Answers, StatedPlace } from '#engine/weather-files/read-options.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';

/** What people have answered of a file, as it is kept beside it; each reading anew goes by it. */
export interface FileAnswers {
  readonly place?: StatedPlace;
  readonly mapping?: TableMapping;
  readonly answers?: Answers;
  readonly keepSuspect?: boolean;
  readonly fillLongGaps?: boolean;
  /** Rules that are not held against this file; accepting it switches them off for its station. */
  readonly rulesOff?: readonly { readonly rule: RuleName; readonly reason: string }[];
}
