import { describe, expect, it } from 'vitest';
import { fixtureHours, fixtureLedger } from '../../../src/app/gallery/fixtures.ts';
import { classMeaning, classWords, dampWords } from '../../../src/charts/hour-class-words.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import {
  costingColumns,
  costWords,
  identitySentence,
  metWords,
  noScoreWords,
  notJudgedWords,
  verdictSentence,
} from '../../../src/features/runs/run-words.ts';

const plain = (text: string | null) => text?.replaceAll('\u00a0', ' ') ?? null;

describe('the verdict in words', () => {
  const spell = { tolerance: 'worst spell', found: 61, allowed: 24, unit: 'h', holds: false };
  const share = { tolerance: 'unmet share of demand hours', found: 11.2, allowed: 3, unit: '%', holds: false };

  it('names every tolerance that fails and by how much', () => {
    const sentence = verdictSentence({ verdict: 'does not', tolerances: [share, spell, { ...spell, holds: true }] });
    expect(plain(sentence)).toBe(
      'Does not meet the brief: unmet share of demand hours 11.2 %, 8.2 points over the 3 % allowed and worst spell 61 h, 37 h over the 24 h allowed.',
    );
  });

  it('says when all hold, and when there is nothing to hold', () => {
    expect(verdictSentence({ verdict: 'meets the brief', tolerances: [] })).toContain('every tolerance holds');
    expect(verdictSentence({ verdict: 'no tolerance set', tolerances: [] })).toContain('no verdict');
  });
});

describe('the identity under a ledger', () => {
  const ledger = fixtureLedger(fixtureHours());

  it('states the sum of the classes', () => {
    expect(identitySentence(ledger)).toBe('The classes add up to 8,760 hours.');
  });

  it('says plainly when they do not add up', () => {
    expect(identitySentence({ ...ledger, hours: 8784 })).toBe(
      'The classes add up to 8,760 hours, the year has 8,784: do not use this ledger.',
    );
  });

  it('gives no share of nothing', () => {
    expect(metWords({ ...ledger, demand: 0, met: 0 })).toBeNull();
    expect(plain(metWords({ ...ledger, demand: 10_000, met: 9_999 }))).toBe('99.9 %');
  });
});

describe('what stands beside or in place of a score', () => {
  it('is the reason, as a sentence would begin', () => {
    expect(noScoreWords({ score: null, scoreNote: 'excluded: no water' })).toBe('Excluded: no water');
    expect(noScoreWords({ score: null, scoreNote: null })).toBe('Not judged yet');
    expect(noScoreWords({ score: 0, scoreNote: null })).toBeNull();
  });

  it('is why no year is shown, where a derived year is no stand-in for the measured one', () => {
    const year = { runId: '', weatherFileId: '', kind: 'typical', year: null, hours: 8760, score: null } as const;
    const figures = { runId: '', demand: 1, met: 1, score: 1, verdict: 'meets the brief' } as const;
    const derived = {
      ...{ weatherFileId: '', name: 'Warmer', words: '' },
      figures: { ...figures, severityKh: 0, worstSpellHours: 0, makeUpLitres: 0 },
      parent: { weatherFileId: '', kind: 'typical', year: null, status: 'withdrawn', figures: null },
    } as const;
    expect(notJudgedWords({ years: [{ ...year }], derived: [] })).toContain('Not judged yet');
    expect(notJudgedWords({ years: [], derived: [] })).toContain('no accepted weather year');
    expect(notJudgedWords({ years: [], derived: [derived] })).toContain('only derived years');
  });

  it('is the grade with the columns that cost a letter, the reason of those that set it', () => {
    const columns = [
      { column: 'distance', grade: 'A', reason: 'at the station' },
      { column: 'measured share', grade: 'B', reason: 'flags say nothing' },
      { column: 'years', grade: 'C', reason: 'one typical year' },
    ] as const;
    expect(costWords(costingColumns([...columns]), 'C')).toBe('years C (one typical year) and measured share B');
  });
});

describe('the words of the classes', () => {
  it('are one for each class, and no two the same', () => {
    expect(Object.keys(classMeaning).sort()).toEqual([...hourClasses].sort());
    expect(new Set(hourClasses.map((hourClass) => classWords[hourClass])).size).toBe(hourClasses.length);
  });

  it('name the reason of damp hours where there is only one', () => {
    expect(dampWords({ dampOutside: 5, dampPlant: 0 })).toBe('Too humid outside');
    expect(dampWords({ dampOutside: 0, dampPlant: 5 })).toBe('Only by too much moisture');
    expect(dampWords({ dampOutside: 5, dampPlant: 5 })).toBe('Too humid outside, or only by too much moisture');
  });
});
