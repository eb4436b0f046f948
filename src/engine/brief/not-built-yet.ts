import type { Brief } from './brief.ts';

/** What of a brief this version cannot judge, each in a plain sentence; empty when the brief is judged in full. */
export function notBuiltYet(brief: Brief): string[] {
  const limit = limitNotBuilt(brief);
  return [
    ...(limit === null ? [] : [limit]),
    ...(brief.hours === 'daylight' ? ['A schedule of daylight hours is not built yet.'] : []),
    ...(brief.secondaryAir === 'exhaust' ? ['Room exhaust as secondary air is not built yet.'] : []),
  ];
}

function limitNotBuilt({ limit }: Brief): string | null {
  switch (limit.kind) {
    case 'fixed':
    case 'adaptive':
      return null;
    case 'inlet':
      return 'A limit at the inlet of a data hall is not built yet.';
    case 'thi':
      return 'A temperature-humidity index for livestock is not built yet.';
    case 'shade-heat':
      return 'The shade heat figure is not built yet.';
    case 'tower':
      return 'Cold water from a cooling tower is not built yet.';
    case 'turbine':
      return 'Cooling of a turbine inlet is not built yet.';
  }
}
