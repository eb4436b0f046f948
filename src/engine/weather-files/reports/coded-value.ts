import { type FindingList, whole } from '../finding-list.ts';
import { codeVerdict } from './report-codes.ts';

/** What the source's quality codes had left out, for one sentence about it. */
export class LeftOutByCode {
  #suspect = 0;
  #erroneous = 0;
  #firstLine = 0;
  readonly #keepSuspect: boolean;

  constructor(keepSuspect: boolean) {
    this.#keepSuspect = keepSuspect;
  }

  /** A value whose code is good, else NaN. */
  accept(value: number, code: string, line: number): number {
    if (Number.isNaN(value)) return value;
    const verdict = codeVerdict(code);
    if (verdict === 'accepted' || (verdict === 'suspect' && this.#keepSuspect)) return value;
    if (verdict === 'suspect') this.#suspect++;
    else this.#erroneous++;
    if (this.#firstLine === 0) this.#firstLine = line;
    return Number.NaN;
  }

  tell(findings: FindingList): void {
    const count = this.#suspect + this.#erroneous;
    if (count === 0) return;
    const parts = [
      this.#suspect > 0 ? `${whole(this.#suspect)} suspect` : '',
      this.#erroneous > 0 ? `${whole(this.#erroneous)} erroneous` : '',
    ].filter((part) => part !== '');
    const offer = this.#suspect > 0 ? ' The suspect ones can be kept if you ask for it.' : '';
    findings.add({
      code: 'source-estimated',
      severity: 'note',
      line: this.#firstLine,
      count,
      message: () =>
        `The source's own quality codes call ${parts.join(' and ')} ${count === 1 ? 'value' : 'values'} of temperature, dew point and pressure so, first on line ${this.#firstLine}; ${count === 1 ? 'it is' : 'they are'} left out.${offer}`,
    });
  }
}
