import { type HumidityRule, type MonthlyChange, stretches } from './monthly-change.ts';

const MONTHS = 12;

export const humidityRuleWords: Readonly<Record<HumidityRule, string>> = {
  'ratio-kept': 'humidity ratio kept',
  'rh-kept': 'relative humidity kept',
  'ratio-scaled': 'humidity ratio scaled',
};

/** The change in a phrase: "dry bulb +2.0 K in every month, days not stretched, humidity ratio kept". */
export function changeWords(monthly: readonly MonthlyChange[], humidityRule: HumidityRule): string {
  const shift = `dry bulb ${span(
    monthly.map(({ shiftK }) => shiftK),
    'K',
  )}`;
  const stretched = monthly.some(stretches)
    ? `daily swing ${span(
        monthly.map(({ maxShiftK, minShiftK }) => maxShiftK - minShiftK),
        'K',
      )}`
    : 'days not stretched';
  const scaled =
    humidityRule === 'ratio-scaled'
      ? ` by ${span(
          monthly.map((each) => each.ratioChangePct),
          '%',
        )}`
      : '';
  return [shift, stretched, `${humidityRuleWords[humidityRule]}${scaled}`].join(', ');
}

function span(values: readonly number[], unit: string): string {
  const [low, high] = [Math.min(...values), Math.max(...values)];
  if (low === high) return `${signed(low)} ${unit} in every month`;
  const mean = values.reduce((sum, value) => sum + value, 0) / MONTHS;
  return `${signed(low)} to ${signed(high)} ${unit} by month, ${signed(mean)} ${unit} on average`;
}

function signed(value: number): string {
  const size = Math.abs(value).toFixed(1);
  if (Number(size) === 0) return size;
  return `${value < 0 ? '−' : '+'}${size}`;
}
