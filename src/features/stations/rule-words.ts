import type { RuleName } from '../../engine/weather-files/quality/quality-options.ts';

/** What each rule looks for, as it is read beside the switch. */
export const ruleWords: Readonly<Record<RuleName, { title: string; meaning: string }>> = {
  'zero-fill': { title: 'Zeros for missing values', meaning: 'runs of zeros that stand where nothing was recorded' },
  'other-climate': { title: 'Another climate', meaning: 'values that do not belong to the latitude of the place' },
  range: { title: 'Records of the continent', meaning: 'values beyond what was ever recorded there' },
  step: { title: 'Steps', meaning: 'jumps from one hour to the next that no weather makes' },
  'straight-line': { title: 'Straight lines', meaning: 'hours that were drawn between two readings' },
  stuck: { title: 'Stuck sensor', meaning: 'one value for longer than the resolution explains' },
  spike: { title: 'Spikes', meaning: 'single hours far from both neighbours' },
  'saw-tooth': { title: 'Saw-tooth', meaning: 'values that go up and down by turns' },
  'pressure-range': { title: 'Pressure against elevation', meaning: 'pressures that do not belong to the height' },
  'place-zone': { title: 'Position against UTC offset', meaning: 'a clock that does not belong to the longitude' },
  'place-sea': { title: 'Position at sea', meaning: 'a station on land that stands in the sea' },
  'elevation-relief': { title: 'Elevation against relief', meaning: 'a height far from that of the ground there' },
};
