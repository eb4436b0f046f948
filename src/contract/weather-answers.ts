import * as z from 'zod/mini';
import type { Answers, StatedPlace } from '#engine/weather-files/read-options.ts';
import type { TableMapping } from '#engine/weather-files/table/table-mapping.ts';

/** What a person says of a file, as it crosses the wire: the engine's own words for it (its types), checked for their form. */

const Column = z.string().check(z.minLength(1), z.maxLength(200));
const Temperature = z.strictObject({ column: Column, unit: z.enum(['C', 'K', 'F']) });
const Order = z.enum(['year first', 'day first', 'month first']);

const TimeColumns = z.discriminatedUnion('form', [
  z.strictObject({ form: z.literal('stamp'), column: Column, order: Order }),
  z.strictObject({ form: z.literal('date and time'), date: Column, time: Column, order: Order }),
  z.strictObject({
    form: z.literal('parts'),
    year: z.nullable(Column),
    month: Column,
    day: Column,
    hour: Column,
    minute: z.nullable(Column),
    hours: z.enum(['hours', 'hours and minutes']),
  }),
  z.strictObject({
    form: z.literal('serial days'),
    column: Column,
    system: z.union([z.literal(1900), z.literal(1904)]),
  }),
  z.strictObject({ form: z.literal('epoch'), column: Column, unit: z.enum(['s', 'ms']) }),
]);

/** How a table is read. */
export const TableMappingBody: z.ZodMiniType<TableMapping> = z.strictObject({
  time: z.strictObject({
    columns: TimeColumns,
    scale: z.enum(['UTC', 'standard', 'clock', 'in stamps']),
    zone: z.nullable(z.string().check(z.maxLength(60))),
    mark: z.enum(['reading', 'ending', 'beginning']),
  }),
  years: z.enum(['actual', 'typical']),
  dryBulb: Temperature,
  dewPoint: z.nullable(Temperature),
  relativeHumidity: z.nullable(z.strictObject({ column: Column, unit: z.enum(['%', 'fraction']) })),
  wetBulb: z.nullable(Temperature),
  pressure: z.nullable(
    z.strictObject({
      column: Column,
      unit: z.enum(['Pa', 'hPa', 'kPa', 'inHg', 'mmHg']),
      level: z.enum(['station', 'sea level', 'altimeter']),
    }),
  ),
  station: z.nullable(Column),
});

/** Where a station stands, as far as a person says. */
export const StatedPlaceBody: z.ZodMiniType<StatedPlace> = z.strictObject({
  name: z.exactOptional(z.string().check(z.trim(), z.minLength(1), z.maxLength(200))),
  latitude: z.exactOptional(z.number().check(z.gte(-90), z.lte(90))),
  longitude: z.exactOptional(z.number().check(z.gte(-180), z.lte(180))),
  elevationM: z.exactOptional(z.number().check(z.gte(-500), z.lte(9000))),
  utcOffsetH: z.exactOptional(z.number().check(z.gte(-12), z.lte(14))),
});

/** Answers to what a file asks, by the code of the question. */
export const AnswersBody: z.ZodMiniType<Answers> = z.strictObject({
  'pressure-sea-level': z.exactOptional(z.enum(['convert', 'keep'])),
  'pressure-elevation': z.exactOptional(z.enum(['pressure', 'elevation'])),
  'dew-is-wet-bulb': z.exactOptional(z.enum(['wet bulb', 'dew point', 'relative humidity'])),
  'unit-guess': z.exactOptional(z.enum(['hectopascals', 'pascals'])),
  'several-periods': z.exactOptional(z.int().check(z.gte(1), z.lte(200))),
  'time-repeat': z.exactOptional(z.enum(['first', 'absent day'])),
  'place-sign': z.exactOptional(z.literal('as written')),
});

/** All that a person says of a file at once. */
export const StatedBody = z.strictObject({
  place: z.exactOptional(StatedPlaceBody),
  mapping: z.exactOptional(TableMappingBody),
  answers: z.exactOptional(AnswersBody),
});
