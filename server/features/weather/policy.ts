import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/** Weather files are the engineers' to change; everyone in the team may look at what they say. */
const changers = memberOf(['engineer', 'lead']);

export const weatherPolicy = {
  'weather.view': memberOf(everyRole),
  'weather.upload': changers,
  'weather.accept': changers,
  'weather.withdraw': changers,
  'weather.original': changers,
  'weather.derive': changers,
} satisfies Record<string, Policy>;
