/** The closed list of policy names that an endpoint's `allow` may take; the server holds one rule for each. */
export const policyNames = [
  'anyone',
  'accounts.signOut',
  'accounts.own',
  'weather.view',
  'weather.upload',
  'weather.accept',
  'weather.withdraw',
  'weather.original',
  'weather.derive',
  'stations.view',
  'stations.change',
  'sites.view',
  'sites.change',
  'sites.export',
  'runs.view',
  'runs.export',
  'briefs.view',
  'briefs.change',
  'teams.view',
  'teams.people',
  'teams.programmes',
  'teams.tokens',
  'audit.view',
  'method.view',
] as const;

export type PolicyName = (typeof policyNames)[number];
