import type { HourClass } from '../engine/hour-classes/hour-class.ts';

/** The one wording of each class. `damp` has two reasons, see `dampWords`; alone it stands for both. */
export const classWords: Readonly<Record<HourClass, string>> = {
  closed: 'Closed',
  missing: 'No data',
  idle: 'Idle',
  frozen: 'Frozen, drained',
  damp: 'Too humid outside, or only by too much moisture',
  air: 'Outdoor air',
  direct: 'Direct',
  indirect: 'Indirect',
  dewpoint: 'Dew-point',
  twostage: 'Two-stage',
  short: 'Plant too weak',
  beyond: 'Out of reach',
};

export const dampOutsideWords = 'Too humid outside';
export const dampPlantWords = 'Only by too much moisture';

/** The words of `damp` in a year of which the hours of each reason are known. */
export function dampWords(reasons: { readonly dampOutside: number; readonly dampPlant: number }): string {
  if (reasons.dampPlant === 0) return dampOutsideWords;
  return reasons.dampOutside === 0 ? dampPlantWords : classWords.damp;
}

/** What each class means, for legends that explain themselves. */
export const classMeaning: Readonly<Record<HourClass, string>> = {
  closed: 'outside the hours of the brief',
  missing: 'in use, but the weather is not known',
  idle: 'in use, with no cooling wanted',
  frozen: 'cooling wanted at or under the freeze lockout, wet parts drained',
  damp: 'the moisture of the air breaks a humidity cap',
  air: 'met by outdoor air alone',
  direct: 'met by a direct stage',
  indirect: 'met by an indirect stage',
  dewpoint: 'met by a dew-point stage',
  twostage: 'met by indirect and direct in line',
  short: 'the plant helps, but not enough',
  beyond: 'no permitted stage helps by a kelvin',
};
