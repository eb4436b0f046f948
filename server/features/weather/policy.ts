import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/** Weather files are the engineers' to change; everyone in the team may look at what they say. */
const changers = memberOf(['engineer', 'lead']);
/** Programs bring files in and read back what was found; deciding on them is for people. */
const uploaders = memberOf(['engineer', 'lead'], 'weather:upload');

export const weatherPolicy = {
  'weather.view': memberOf(everyRole, 'weather:read'),
  'weather.upload': uploaders,
  'weather.accept': changers,
  'weather.withdraw': changers,
  'weather.original': changers,
  'weather.derive': changers,
} satisfies Record<string, Policy>;
