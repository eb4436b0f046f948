import { everyRole, memberOf, type Policy } from '../../http/policy.ts';

/** Stations are the engineers' to change; everyone in the team may look at them. */
export const stationsPolicy = {
  'stations.view': memberOf(everyRole, 'weather:read'),
  'stations.change': memberOf(['engineer', 'lead']),
} satisfies Record<string, Policy>;
