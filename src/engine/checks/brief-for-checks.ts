/** A plain brief for checks that need one: outdoor air and a direct stage for a room at 26 °C, office hours. */
export const officeForChecks = {
  preset: 'checks',
  source: 'checks of the method',
  phi: 'constant',
  control: 'modulating',
  primaryAir: 'outdoor',
  secondaryAir: 'outdoor',
  clock: 'civil',
  months: 'all',
  weekdays: 'mon-fri',
  hours: '8-18',
  caps: { roomRhPct: 65 },
  limit: { kind: 'fixed', tempC: 26 },
  dTroomK: 5,
  stages: ['direct'],
  tolerance: { sharePct: 3 },
  gates: [],
} as const;
