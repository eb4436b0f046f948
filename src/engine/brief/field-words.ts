/** Words for what a brief holds in lists and choices; one wording per thing wherever it is shown. */
const stages: Readonly<Record<string, string>> = {
  direct: 'direct',
  indirect: 'indirect',
  dewpoint: 'dew-point',
  twostage: 'two-stage',
  tower: 'cooling tower',
};
const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'] as const;
const components: Readonly<Record<string, string>> = {
  served: 'served share of demand hours, %',
  severity: 'severity, K h per 1,000 demand hours',
  spell: 'worst spell, h',
  damp: 'damp share, %',
  water: 'make-up water, L per kWh',
  electricity: 'electricity saved, %',
  'worst-year': 'worst year’s served share, %',
};
const limitKinds: Readonly<Record<string, string>> = {
  fixed: 'a fixed room temperature',
  adaptive: 'an adaptive room temperature',
  inlet: 'the inlet of a data hall',
  thi: 'a temperature-humidity index',
  'shade-heat': 'the shade heat figure',
  tower: 'cold process water',
  turbine: 'a turbine inlet',
};

export const stageWords = (stage: unknown): string => stages[String(stage)] ?? String(stage);
export const monthWords = (month: unknown): string => MONTHS[Number(month) - 1] ?? String(month);
export const componentWords = (component: unknown): string => components[String(component)] ?? String(component);
export const limitKindWords = (kind: unknown): string => limitKinds[String(kind)] ?? 'none';
