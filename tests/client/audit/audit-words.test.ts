import { describe, expect, test } from 'vitest';
import { auditActs, teamAuditKinds } from '../../../src/contract/audit.ts';
import { auditSearch, changedAuditView, readAuditView } from '../../../src/features/audit/audit-view.ts';
import { aboutWords, actWords, kindWords, subjectLines, whoWords } from '../../../src/features/audit/audit-words.ts';

const event = (subject: Record<string, unknown>) => ({
  ...{ position: 1, at: '2027-03-31T12:00:00.000000Z', person: null, act: 'site made', requestId: null, hash: 'a' },
  subject,
});

describe('what is said of an event', () => {
  test('names what it was about, by letters and name where it has both, and leads to its page', () => {
    const site = event({ programmeId: 'p', siteId: 's', letters: 'ab', name: 'Harbour school' });
    expect(aboutWords(site, 't')).toEqual({ name: 'ab, Harbour school', to: '/teams/t/programmes/p/sites/s' });
    expect(aboutWords(event({ fileId: 'f', name: 'a.epw' }), 't').to).toBe('/teams/t/weather/f');
    expect(aboutWords(event({ email: 'ann@school.example' }), 't')).toEqual({ name: 'ann@school.example', to: null });
    expect(aboutWords(event({}), 't')).toEqual({ name: null, to: null });
  });

  test('unfolds into a line for each value, however deep', () => {
    const lines = subjectLines({
      fileId: 'f',
      was: { elevationM: 10 },
      scopes: ['a', 'b'],
      sites: [{ name: 'x' }],
      lastDay: null,
    });
    expect(lines.map(({ label, text }) => `${label}: ${text}`)).toEqual([
      'file id: f',
      'was, elevation m: 10',
      'scopes: a, b',
      'sites, 1, name: x',
      'last day: none',
    ]);
  });

  test('tells a program from the person whose token it brought', () => {
    const person = { id: 'p', name: 'Ada' };
    const act = 'weather batch begun';
    expect(whoWords({ person, act, subject: { tokenId: null } })).toBe('Ada');
    expect(whoWords({ person, act: 'token made', subject: { tokenId: 't' } })).toBe('Ada');
    expect(whoWords({ person, act, subject: { tokenId: 't' } })).toBe('A program, with a token of Ada');
    expect(whoWords({ person: null, act, subject: {} })).toBe('The server');
  });

  test('has words for every kind that a team may have', () => {
    expect(Object.keys(kindWords)).toEqual([...teamAuditKinds]);
    expect(Object.keys(auditActs).filter((kind) => kind !== 'accounts')).toEqual([...teamAuditKinds]);
    expect(actWords('weather file accepted')).toBe('Weather file accepted');
  });
});

describe('the address of the trail', () => {
  test('holds every choice, and leaves out what no trail could be narrowed to', () => {
    const search = '?from=2027-01-01&kind=sites&object=Hall&before=51';
    expect(auditSearch(readAuditView(new URLSearchParams(search)))).toBe(search);
    expect(readAuditView(new URLSearchParams('?from=yesterday&kind=accounts&personId=7&before=-1'))).toEqual({
      filter: {},
      before: null,
    });
  });

  test('begins with the newest event again when a choice changes', () => {
    const view = readAuditView(new URLSearchParams('?kind=sites&before=51'));
    expect(auditSearch(changedAuditView(view, 'object', 'Hall'))).toBe('?kind=sites&object=Hall');
    expect(auditSearch(changedAuditView(view, 'kind', ''))).toBe('?');
  });
});
