import { describe, expect, test } from 'vitest';
import { BriefBody } from '../../../src/contract/brief-body.ts';
import { briefDifference } from '../../../src/engine/brief/brief-difference.ts';
import { fieldsOfLimit } from '../../../src/engine/brief/brief-fields.ts';
import {
  bodyOfDraft,
  carriedOver,
  DraftForm,
  type DraftValues,
  draftOf,
  readDraftValues,
  typedNumber,
  valueAt,
} from '../../../src/features/briefs/draft.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';

const problemsOf = (values: DraftValues): Readonly<Record<string, string>> => {
  const reading = readDraftValues(values);
  return reading.ok ? {} : reading.problems;
};

describe('a draft', () => {
  test.each(presetNames)('of the preset %s says the same brief again when nothing is changed', (name) => {
    const reading = readDraftValues(draftOf(presetBrief(name)));
    expect(reading.ok && briefDifference(presetBrief(name), reading.brief)).toEqual([]);
    expect(BriefBody.safeParse(presetBrief(name)).data).toEqual(presetBrief(name));
  });

  test.each(presetNames)('of the preset %s has a value for every field that must have one', (name) => {
    const draft = draftOf(presetBrief(name));
    const needed = fieldsOfLimit(presetBrief(name).limit).filter(({ kind }) => kind !== 'optional');
    expect(needed.length).toBeGreaterThan(8);
    for (const { path } of needed) expect(valueAt(draft, path), path).not.toBeUndefined();
  });

  test('leaves out prices, grid and reason that are blank, and keeps those that are begun', () => {
    const draft = draftOf(presetBrief('office'));
    expect(Object.keys(bodyOfDraft(draft))).not.toContain('prices');
    const begun = { ...draft, prices: { currency: '', waterPerM3: 2 }, grid: { source: '', kgCo2PerKwh: 0.4 } };
    expect(Object.keys(problemsOf(begun))).toEqual(['prices.currency', 'grid.source']);
  });

  test('of a room changes from a fixed limit to an adaptive one without what the other needs', () => {
    const draft = draftOf(presetBrief('office'));
    const adaptive = { ...draft, limit: { kind: 'adaptive', tempC: 26, model: 'en16798-ii', ceilingC: null } };
    expect(bodyOfDraft(adaptive).limit).toEqual({ kind: 'adaptive', model: 'en16798-ii', ceilingC: null });
    expect(readDraftValues(adaptive).ok).toBe(true);
  });
});

describe('what is typed', () => {
  test('is a number with point or comma, nothing, or stays as it was typed', () => {
    const typed = ['0.85', ' 26 ', '0,5', '−3', '', ' ', 'warm', '1,000.5', 'NaN', 'Infinity'];
    expect(typed.map(typedNumber)).toEqual([0.85, 26, 0.5, -3, null, null, 'warm', '1,000.5', 'NaN', 'Infinity']);
  });
});

describe('faults of a draft', () => {
  const office = presetBrief('office');

  test('stand at their fields, all at once', () => {
    const draft = {
      ...draftOf(office),
      cycles: 1,
      effDirect: 'x',
      hours: '8-8',
      score: office.score.map((part, index) => ({ ...part, weight: index === 2 ? -5 : part.weight })),
    };
    const problems = problemsOf(draft);
    expect(Object.keys(problems).sort()).toEqual(['cycles', 'effDirect', 'hours', 'score', 'score.2.weight']);
    expect(problems.hours).toContain('pening and closing such as 8-18');
    // A weight that is refused counts for nothing in the sum.
    expect(problems.score).toBe('The weights must add up to 100, not 90.');
  });

  test('between fields are said as well: caps that leave no room, demand that begins over the limit', () => {
    const draft = { ...draftOf(office), lowerLimits: { roomRhPct: 80 }, balanceTempC: 30 };
    expect(Object.keys(problemsOf(draft))).toEqual(['lowerLimits.roomRhPct', 'balanceTempC']);
  });

  test('hold the form back, and the form without one through', () => {
    const parsed = DraftForm.safeParse({ ...draftOf(office), cycles: 1 });
    expect(parsed.error?.issues.map(({ path }) => path.join('.'))).toEqual(['cycles']);
    expect(DraftForm.safeParse(draftOf(office)).success).toBe(true);
  });

  test('of a clinic: direct cooling without a written reason', () => {
    const draft = draftOf(presetBrief('clinic'));
    const wet = { ...draft, stages: ['direct', 'indirect'] };
    expect(problemsOf(wet).stages).toMatch(/written reason/);
    expect(readDraftValues({ ...wet, stagesReason: 'Waiting hall' }).ok).toBe(true);
  });
});

describe('a draft carried over to a version that somebody else saved', () => {
  const from = presetBrief('office');
  const to = {
    ...from,
    cycles: 6,
    caps: { roomRhPct: 60, supplyRhPct: 90 },
    limit: { kind: 'fixed' as const, tempC: 27 },
  };

  test('keeps what it changed and takes the rest from that version, field by field', () => {
    const left = { ...draftOf(from), effDirect: 0.8, caps: { roomRhPct: 70, supplyRhPct: null, supplyDewPointC: 15 } };
    const reading = readDraftValues(carriedOver(left, { from, to }));
    expect(reading.ok && reading.brief).toEqual({
      ...to,
      effDirect: 0.8,
      caps: { roomRhPct: 70, supplyRhPct: 90, supplyDewPointC: 15 },
    });
  });

  test('keeps what is at fault as it was typed', () => {
    const carried = carriedOver({ ...draftOf(from), cycles: 'six' }, { from, to });
    expect(Object.keys(problemsOf(carried))).toEqual(['cycles']);
  });

  test('is that version when it changed nothing', () => {
    const reading = readDraftValues(carriedOver(draftOf(from), { from, to }));
    expect(reading.ok && briefDifference(to, reading.brief)).toEqual([]);
  });
});
