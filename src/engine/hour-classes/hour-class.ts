/** The hour classes in the order in which method.md 5 tests them; a stored class is its position in this list. */
export const hourClasses = [
  'closed',
  'missing',
  'idle',
  'frozen',
  'damp',
  'air',
  'direct',
  'indirect',
  'dewpoint',
  'twostage',
  'short',
  'beyond',
] as const;

/** What an hour of the year is under a brief: exactly one for every slot. */
export type HourClass = (typeof hourClasses)[number];
