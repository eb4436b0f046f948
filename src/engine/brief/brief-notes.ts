import type { Brief } from './brief.ts';

/** What must be said with every result of a brief, in plain sentences: what its method leaves out or takes on its own. */
export function briefNotes(brief: Brief): string[] {
  const { limit, basinHeat, secondaryAir, stagesReason } = brief;
  return [
    ...(limit.kind === 'inlet' && hasCaps(brief)
      ? ['The humidity caps are to be held by the hall’s own humidity control: outdoor air does not enter the hall.']
      : []),
    ...(basinHeat ? ['With a heated basin frozen hours count as met; the heater’s electricity is not counted.'] : []),
    ...(limit.kind === 'turbine'
      ? ['Figures of a turbine inlet are for 1 kW per K of inlet air; its electricity is not applicable.']
      : []),
    ...(limit.kind === 'shade-heat'
      ? [
          'The shade heat figure, 0.7 of the wet bulb and 0.3 of the dry bulb, is ours and stands for no measured index: measure on site.',
        ]
      : []),
    ...(secondaryAir === 'exhaust'
      ? ['Room exhaust is taken at the set-point of the room, with the moisture of the supply and of the room (ours).']
      : []),
    ...(stagesReason === undefined ? [] : [`Stages switched on with a reason: ${stagesReason}`]),
  ];
}

function hasCaps({ caps }: Brief): boolean {
  return Object.values(caps).some((cap) => cap !== undefined);
}
