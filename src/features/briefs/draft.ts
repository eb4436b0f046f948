/** A brief as it stands in the form, and how it becomes a body and back. Pure; the engine alone says what is wrong. */
import { type BriefDraft, checkedDraft } from '../../contract/brief-body.ts';
import type { Brief } from '../../engine/brief/brief.ts';
import { type BriefField, fieldsOfLimit } from '../../engine/brief/brief-fields.ts';
import { readBrief } from '../../engine/brief/brief-from-preset.ts';
import { isRecord } from '../../engine/brief/fields.ts';

/** Values of the form by field; what was typed and is no number stays as it was typed. */
export type DraftValues = Record<string, unknown>;

/** Messages by path, with dots throughout: `score.2.weight`. */
export type DraftProblems = Readonly<Record<string, string>>;

/** A saved brief as the form's first values: every optional text is there, so that each input has one. */
export function draftOf(brief: Brief): DraftValues {
  const { limit, prices, grid, stagesReason = '' } = brief;
  return {
    ...structuredClone(brief),
    limit: limit.kind === 'inlet' ? { derate: '', ...limit } : { ...limit },
    prices: { currency: '', ...prices },
    grid: { source: '', ...grid },
    stagesReason,
  };
}

/** A kept draft as values of today's form: fields that it does not have take those of the saved brief, others are left behind. */
export function restoredDraft(kept: DraftValues, brief: Brief): DraftValues {
  const saved = draftOf(brief);
  return Object.fromEntries(Object.entries(saved).map(([name, value]) => [name, name in kept ? kept[name] : value]));
}

/** The draft on top of another version: what it left alone follows that version, what it changed stays changed. */
export function carriedOver(draft: DraftValues, { from, to }: { from: Brief; to: Brief }): DraftValues {
  const carry = (mine: unknown, before: unknown, after: unknown): unknown => {
    if (JSON.stringify(mine ?? null) === JSON.stringify(before ?? null)) return after;
    if (!isRecord(mine) || !isRecord(before) || !isRecord(after)) return mine;
    const names = [...new Set([...Object.keys(after), ...Object.keys(mine)])];
    return Object.fromEntries(names.map((name) => [name, carry(mine[name], before[name], after[name])]));
  };
  const carried = carry(restoredDraft(draft, from), draftOf(from), draftOf(to));
  return isRecord(carried) ? { ...carried } : draftOf(to);
}

/** What is typed into a number's field: a number, `null` for nothing, else the text itself for the engine to refuse. */
export function typedNumber(text: string): number | string | null {
  const trimmed = text
    .trim()
    .replace('−', '-')
    .replace(/^(-?\d+),(\d+)$/, '$1.$2');
  if (trimmed === '') return null;
  const value = Number(trimmed);
  return Number.isFinite(value) ? value : text;
}

/** What the form would send: groups that are blank throughout are left out, and so is what the limit does not have. */
export function bodyOfDraft(values: DraftValues): BriefDraft {
  const { prices, grid, stagesReason, limit, ...rest } = values;
  return {
    ...rest,
    limit: limitOfDraft(limit),
    ...(isBlank(prices) ? {} : { prices }),
    ...(isBlank(grid) ? {} : { grid }),
    ...(typeof stagesReason === 'string' && stagesReason.trim() !== '' ? { stagesReason } : {}),
  };
}

function limitOfDraft(limit: unknown): unknown {
  if (!isRecord(limit)) return limit;
  const kind = limitKindOf({ limit });
  if (kind === null) return limit;
  const names = fieldsOfLimit({ kind }).flatMap(({ path }) => /^limit\.(\w+)$/.exec(path)?.[1] ?? []);
  const kept = names.filter((name) => limit[name] !== undefined && !(name === 'derate' && limit[name] === ''));
  return { kind, ...Object.fromEntries(kept.map((name) => [name, limit[name]])) };
}

const KINDS = ['fixed', 'adaptive', 'inlet', 'thi', 'shade-heat', 'tower', 'turbine'] as const;

export function limitKindOf({ limit }: { limit?: unknown }): (typeof KINDS)[number] | null {
  return isRecord(limit) ? (KINDS.find((kind) => kind === limit.kind) ?? null) : null;
}

function isBlank(group: unknown): boolean {
  return (
    !isRecord(group) || Object.values(group).every((value) => value === null || value === undefined || value === '')
  );
}

export type DraftReading =
  | { readonly ok: true; readonly brief: Brief }
  | { readonly ok: false; readonly problems: DraftProblems };

/** Reads the form as the server will: every fault at once, each at its field. */
export function readDraftValues(values: DraftValues): DraftReading {
  const reading = readBrief(bodyOfDraft(values));
  if (reading.ok) return reading;
  const problems: Record<string, string> = {};
  for (const { path, message } of reading.faults) {
    problems[dotted(path)] ??= `${message.charAt(0).toUpperCase()}${message.slice(1)}.`;
  }
  return { ok: false, problems };
}

const dotted = (path: string): string => path.replaceAll(/\[(\d+)\]/g, '.$1');

/** The form's schema: it holds what the engine holds, so that nothing is sent that would be refused. */
export const DraftForm = checkedDraft((values) => {
  const reading = readDraftValues(values);
  return reading.ok ? {} : reading.problems;
});

/** The value at a path such as `caps.roomRhPct`. */
export function valueAt(values: unknown, path: string): unknown {
  let found = values;
  for (const key of path.split('.'))
    found = isRecord(found) ? found[key] : Array.isArray(found) ? found[Number(key)] : undefined;
  return found;
}

/** The fields of a draft's group, in order. */
export function fieldsOfGroup(kind: (typeof KINDS)[number], group: BriefField['group']): readonly BriefField[] {
  return fieldsOfLimit({ kind }).filter((field) => field.group === group);
}
