import type { Brief, GridFactor, Prices } from './brief.ts';
import type { Fields, Range } from './fields.ts';

/** Wide enough for a currency of many zeros. */
const PRICE: Range = { min: 0, max: 1e7 };
const EXTRA: Range = { min: -1e10, max: 1e10 };

/** Prices and grid factor of a brief, each left out where the brief has none: no default is presented as a fact. */
export function readMoney(fields: Fields): Pick<Brief, 'prices' | 'grid'> {
  return {
    ...(fields.has('prices') ? { prices: readPrices(fields.group('prices')) } : {}),
    ...(fields.has('grid') ? { grid: readGrid(fields.group('grid')) } : {}),
  };
}

function readPrices(prices: Fields): Prices {
  const optional = <Name extends keyof Omit<Prices, 'currency'>>(name: Name, range: Range) =>
    prices.has(name) ? { [name]: prices.number(name, range) } : {};
  const read = {
    currency: prices.text('currency'),
    ...optional('electricityPerKwh', PRICE),
    ...optional('waterPerM3', PRICE),
    ...optional('extraCapitalPerKw', EXTRA),
    ...optional('extraUpkeepPerKwYear', EXTRA),
  };
  prices.refuseOthers();
  return read;
}

function readGrid(grid: Fields): GridFactor {
  const read = {
    kgCo2PerKwh: grid.number('kgCo2PerKwh', { min: 0, max: 3, unit: 'kg per kWh' }),
    source: grid.text('source'),
  };
  grid.refuseOthers();
  return read;
}
