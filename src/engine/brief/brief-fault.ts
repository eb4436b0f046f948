/** One thing wrong with a brief, located by the path of its field, such as `caps.roomRhPct` or `score[2].weight`. */
export interface BriefFault {
  readonly path: string;
  readonly message: string;
}

/** A brief that cannot be used, with every fault at once. */
export class BriefFaultsError extends Error {
  readonly faults: readonly BriefFault[];

  constructor(faults: readonly BriefFault[]) {
    super(faults.map(({ path, message }) => `${path}: ${message}`).join('; '));
    this.name = 'BriefFaultsError';
    this.faults = faults;
  }
}
