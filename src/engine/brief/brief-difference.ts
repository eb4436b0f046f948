import type { Brief, HardLimit, Limit, ScoreAnchor } from './brief.ts';
import { type BriefField, briefFields, fieldsOfLimit } from './brief-fields.ts';
import { canonicalJson } from './canonical-json.ts';
import { componentWords, limitKindWords, monthWords, stageWords } from './field-words.ts';
import { isRecord } from './fields.ts';

/** One field that two briefs hold differently, in words with units. */
export interface BriefChange {
  readonly path: string;
  readonly label: string;
  readonly before: string;
  readonly after: string;
}

interface Named {
  readonly label: string;
  readonly words: (value: unknown) => string;
}

/**
 * What differs from one brief to another, in the order in which a brief is written. Every field is compared, also one that
 * the brief's use does not have: equal bodies have no change, and bodies that differ have one at least.
 */
export function briefDifference(before: Brief, after: Brief): BriefChange[] {
  const known = new Map<string, Named>();
  // A later entry of one path wins: the words of what the new brief limits, before those of the old one.
  for (const field of [...briefFields, ...fieldsOfLimit(before.limit), ...fieldsOfLimit(after.limit)]) {
    known.set(field.path, { label: field.label, words: (value) => fieldWords(field, value) });
  }
  const one = leavesOf(before);
  const other = leavesOf(after);
  const paths = [...new Set([...one.keys(), ...other.keys()])];
  const order = ['limit.kind', ...known.keys()];
  const placeOf = (path: string): number => (order.includes(path) ? order.indexOf(path) : order.length);
  return paths
    .filter((path) => canonicalJson(one.get(path) ?? null) !== canonicalJson(other.get(path) ?? null))
    .toSorted((a, b) => placeOf(a) - placeOf(b))
    .map((path) => {
      const { label, words } = known.get(path) ?? wordsOfList(path);
      return { path, label, before: words(one.get(path)), after: words(other.get(path)) };
    });
}

/** The values of a brief by path; lists are one value, but for the score's, which is one per component. */
function leavesOf(brief: Brief): ReadonlyMap<string, unknown> {
  const leaves = new Map<string, unknown>();
  const walk = (value: unknown, path: string): void => {
    if (path === 'score' && Array.isArray(value)) {
      leaves.set(
        'score',
        brief.score.map(({ component }) => component),
      );
      for (const anchor of brief.score) leaves.set(`score.${anchor.component}`, anchor);
    } else if (isRecord(value)) {
      for (const [name, field] of Object.entries(value)) walk(field, path === '' ? name : `${path}.${name}`);
    } else if (value !== undefined) leaves.set(path, value);
  };
  walk(brief, '');
  return leaves;
}

const NONE = 'none';

/** The value of a field in words with its unit. */
export function fieldWords(field: BriefField, value: unknown): string {
  if (value === undefined || value === null || value === '') return field.words?.[''] ?? NONE;
  const word = field.words?.[String(value)];
  if (word !== undefined) return word;
  const hasUnit = field.unit !== '' && field.kind !== 'text';
  return hasUnit ? `${String(value)} ${field.unit}` : String(value);
}

const lists: Readonly<Record<string, Named>> = {
  'limit.kind': { label: 'What is limited', words: limitKindWords },
  stages: { label: 'Stages, in order', words: (value) => listWords(value, stageWords) },
  months: { label: 'Months', words: (value) => (value === 'all' ? 'all' : listWords(value, monthWords)) },
  hardLimits: { label: 'Hard limits', words: (value) => listWords(value, (entry) => hardLimitWords(entry)) },
  score: { label: 'Score, components in order', words: (value) => listWords(value, componentWords) },
  gates: { label: 'Site questions', words: (value) => listWords(value, String) },
  reported: { label: 'Reported', words: (value) => listWords(value, String) },
  primaryAir: { label: 'Primary air', words: plainWords },
  preset: { label: 'Preset', words: plainWords },
};

function wordsOfList(path: string): Named {
  const component = /^score\.(.+)$/.exec(path)?.[1];
  if (component !== undefined) return { label: `Score, ${componentWords(component)}`, words: anchorWords };
  return lists[path] ?? { label: path, words: plainWords };
}

function plainWords(value: unknown): string {
  return value === undefined || value === null || value === '' ? NONE : String(value);
}

function listWords(value: unknown, words: (entry: unknown) => string): string {
  return Array.isArray(value) && value.length > 0 ? value.map(words).join(', ') : NONE;
}

function hardLimitWords(entry: unknown): string {
  if (!isHardLimit(entry)) return plainWords(entry);
  const derated = entry.derate === undefined ? '' : `, derated ${entry.derate}`;
  return `${entry.hours} h over ${entry.tempC} °C${derated}`;
}

function anchorWords(value: unknown): string {
  return isAnchor(value) ? `weight ${value.weight}, 0 at ${value.a0}, 100 at ${value.a100}` : 'not counted';
}

function isHardLimit(value: unknown): value is HardLimit {
  return isRecord(value) && 'tempC' in value && 'hours' in value;
}

function isAnchor(value: unknown): value is ScoreAnchor {
  return isRecord(value) && 'weight' in value && 'a0' in value;
}

/**
 * What the field at a path of a draft is called, for a message that stands away from it; entries of lists by the name of their
 * list, with dots throughout.
 */
export function labelOfPath(path: string, kind: Limit['kind'] | null): string {
  const fields = kind === null ? briefFields : fieldsOfLimit({ kind });
  const label = fields.find((field) => field.path === path)?.label;
  if (label !== undefined) return label;
  const [name = path, index] = path.split('.');
  const group = name === 'score' ? 'Score' : (lists[path] ?? lists[name])?.label;
  if (group === undefined) return path;
  return index === undefined || !/^\d+$/.test(index) ? group : `${group}, row ${Number(index) + 1}`;
}
