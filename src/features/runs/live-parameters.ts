/** The parameters of a brief that are tried out on the map, by what the brief limits and which stages it permits. Pure. */
import type { BriefBody } from '../../contract/brief-body.ts';
import { fieldsOfLimit } from '../../engine/brief/brief-fields.ts';
import { isRecord } from '../../engine/brief/fields.ts';
import { parseHours } from '../../engine/brief/schedule-hours.ts';
import { list, withUnit } from '../../lib/format.ts';

/** A number with its slider. `scale` turns the brief's value into what is shown: an effectiveness of 0.85 is 85 %. */
export interface LiveNumber {
  readonly kind: 'number';
  /** Its place in the brief, such as `caps.roomRhPct`. */
  readonly path: string;
  readonly label: string;
  readonly unit: string;
  /** Of the brief's own value. */
  readonly saved: number;
  readonly scale: number;
  /** Ends and step of the slider, as shown; what is typed may go beyond them as far as the brief allows. */
  readonly min: number;
  readonly max: number;
  readonly step: number;
}

/** Opening and closing, two thumbs on one slider. */
export interface LiveHours {
  readonly kind: 'hours';
  readonly path: 'hours';
  readonly label: string;
  readonly saved: string;
}

export type LiveParameter = LiveNumber | LiveHours;

/** Changed values by path; what is left out is as it was saved. */
export type LiveDraft = Readonly<Record<string, number | string>>;

interface Slide {
  readonly path: string;
  readonly label?: string;
  readonly unit?: string;
  readonly scale?: number;
  readonly ends: readonly [min: number, max: number, step: number];
}

const effectiveness = (path: string, label: string): Slide => ({
  path,
  label,
  unit: '%',
  scale: 100,
  ends: [30, 100, 1],
});

/** In the order of the margin: equipment, set-point, caps, load. */
function slidesOf({ limit, stages, primaryAir }: BriefBody): readonly Slide[] {
  const has = (...words: string[]) => stages.some((stage) => words.includes(stage));
  const equipment = [
    ...(has('direct', 'twostage') ? [effectiveness('effDirect', 'Direct effectiveness')] : []),
    ...(has('indirect', 'twostage') ? [effectiveness('effIndirect', 'Indirect wet-bulb effectiveness')] : []),
    ...(has('dewpoint') ? [effectiveness('effDewPoint', 'Dew-point effectiveness')] : []),
    ...(primaryAir === 'return' ? [effectiveness('effExchanger', 'Dry effectiveness of the exchanger')] : []),
  ];
  const caps: readonly Slide[] = [
    { path: 'caps.roomRhPct', ends: [30, 100, 1] },
    { path: 'caps.supplyRhPct', ends: [30, 100, 1] },
    { path: 'caps.supplyDewPointC', ends: [5, 25, 0.5] },
  ];
  switch (limit.kind) {
    case 'fixed':
      return [...equipment, { path: 'limit.tempC', ends: [18, 36, 0.5] }, ...caps, RISE];
    case 'adaptive':
      return [...equipment, { path: 'limit.ceilingC', ends: [24, 38, 0.5] }, ...caps, RISE];
    case 'inlet':
      return [
        ...equipment,
        { path: 'limit.tempC', ends: [18, 40, 0.5] },
        ...caps,
        { path: 'dTitK', ends: [5, 25, 0.5] },
      ];
    case 'thi':
      return [...equipment, { path: 'limit.value', unit: 'points', ends: [60, 90, 0.5] }, ...caps, RISE];
    case 'shade-heat':
      return [...equipment, { path: 'limit.value', unit: '°C', ends: [18, 36, 0.5] }, ...caps, RISE];
    case 'tower':
      return [
        { path: 'limit.approachK', ends: [2, 12, 0.5] },
        { path: 'limit.coldC', ends: [8, 40, 0.5] },
        { path: 'limit.rangeK', ends: [2, 15, 0.5] },
      ];
    case 'turbine':
      return [...equipment, { path: 'limit.targetC', ends: [5, 30, 0.5] }];
  }
}

const RISE: Slide = { path: 'dTroomK', ends: [1, 15, 0.5] };

/** The parameters that a brief has; one that it leaves out (a cap, a ceiling) is not offered. */
export function liveParameters(body: BriefBody): readonly LiveParameter[] {
  const fields = new Map(fieldsOfLimit(body.limit).map((field) => [field.path, field]));
  const numbers = slidesOf(body).flatMap((slide): LiveNumber[] => {
    const saved = valueIn(body, slide.path);
    const field = fields.get(slide.path);
    if (typeof saved !== 'number' || field === undefined) return [];
    const { scale = 1, ends } = slide;
    const [min, max, step] = ends;
    const shown = shownValue(saved, scale);
    return [
      {
        kind: 'number',
        path: slide.path,
        label: slide.label ?? field.label,
        unit: slide.unit ?? field.unit,
        saved,
        scale,
        min: Math.min(min, shown),
        max: Math.max(max, shown),
        step,
      },
    ];
  });
  const hours = typeof parseHours(body.hours) === 'object' && parseHours(body.hours) !== null;
  return [...numbers, ...(hours ? [{ kind: 'hours', path: 'hours', label: 'Open', saved: body.hours } as const] : [])];
}

/** 0.85 as 85, without the dust of binary fractions. */
export function shownValue(value: number, scale: number): number {
  return Number((value * scale).toPrecision(10));
}

export function savedValue(shown: number, scale: number): number {
  return Number((shown / scale).toPrecision(10));
}

/** The draft with one value changed; a value as it was saved is no change. */
export function changed(draft: LiveDraft, parameter: LiveParameter, value: number | string): LiveDraft {
  const { [parameter.path]: _before, ...rest } = draft;
  return value === parameter.saved ? rest : { ...rest, [parameter.path]: value };
}

/** The brief with the changed values in their places. */
export function bodyOfLiveDraft(body: BriefBody, draft: LiveDraft): Readonly<Record<string, unknown>> {
  return Object.entries(draft).reduce<Readonly<Record<string, unknown>>>(
    (made, [path, value]) => put(made, path.split('.'), value),
    { ...body },
  );
}

function put(
  record: Readonly<Record<string, unknown>>,
  [name = '', ...rest]: readonly string[],
  value: unknown,
): Readonly<Record<string, unknown>> {
  if (rest.length === 0) return { ...record, [name]: value };
  const inner = record[name];
  return { ...record, [name]: put(isRecord(inner) ? inner : {}, rest, value) };
}

function valueIn(body: unknown, path: string): unknown {
  return path.split('.').reduce<unknown>((held, name) => (isRecord(held) ? held[name] : undefined), body);
}

/** `effDirect:0.8,hours:8-18`, in the order of the parameters; null for no change. */
export function printLiveDraft(draft: LiveDraft): string | null {
  const entries = Object.entries(draft).sort(([one], [other]) => one.localeCompare(other));
  return entries.length === 0 ? null : entries.map(([path, value]) => `${path}:${value}`).join(',');
}

/** What an address says of the parameters that the brief has; the rest is left out. */
export function readLiveDraft(text: string | null, parameters: readonly LiveParameter[]): LiveDraft {
  const given = new Map((text ?? '').split(',').map((entry) => splitOnce(entry)));
  return parameters.reduce<LiveDraft>((draft, parameter) => {
    const value = given.get(parameter.path);
    if (value === undefined) return draft;
    if (parameter.kind === 'hours') return parseHours(value) === null ? draft : changed(draft, parameter, value);
    const number = Number(value);
    return value === '' || !Number.isFinite(number) ? draft : changed(draft, parameter, number);
  }, {});
}

function splitOnce(entry: string): [string, string] {
  const at = entry.indexOf(':');
  return at === -1 ? [entry, ''] : [entry.slice(0, at), entry.slice(at + 1)];
}

/** "direct effectiveness 75 % (85 %), open 7 to 18 h (8 to 16 h)": each changed value, and in brackets the saved one. */
export function draftWords(parameters: readonly LiveParameter[], draft: LiveDraft): string {
  return list(
    parameters.flatMap((parameter) => {
      const value = draft[parameter.path];
      if (value === undefined) return [];
      const label = parameter.label.charAt(0).toLowerCase() + parameter.label.slice(1);
      return [`${label} ${valueWords(parameter, value)} (${valueWords(parameter, parameter.saved)})`];
    }),
  );
}

function valueWords(parameter: LiveParameter, value: number | string): string {
  if (parameter.kind === 'hours') return `${String(value).replace('-', ' to ')}\u00a0h`;
  const shown = shownValue(Number(value), parameter.scale);
  return withUnit(shown, parameter.unit, Number.isInteger(shown) ? 0 : 1);
}
