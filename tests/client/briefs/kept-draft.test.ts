import { describe, expect, test } from 'vitest';
import { draftOf, restoredDraft } from '../../../src/features/briefs/draft.ts';
import { dropDraft, findDraft, type KeptDraft, keepDraft } from '../../../src/features/briefs/kept-draft.ts';
import { presetBrief } from '../../support/presets.ts';

/** A device's storage; `full` refuses to keep anything, as a browser does when its room is used up. */
function device({ full = false } = {}) {
  const held = new Map<string, string>();
  return {
    held,
    getItem: (name: string) => held.get(name) ?? null,
    setItem(name: string, text: string) {
      if (full) throw new DOMException('no room', 'QuotaExceededError');
      held.set(name, text);
    },
    removeItem: (name: string) => void held.delete(name),
  };
}

let made = 0;
function newKey() {
  made += 1;
  return { personId: 'ann', briefId: `brief ${made}` };
}
const draft = (values: Record<string, unknown>): KeptDraft => ({
  basedOn: 3,
  keptAt: '2026-12-01T10:00:00.000Z',
  values,
});

describe('a draft that is left', () => {
  test('is found again on the device, with the version that it began from', () => {
    const storage = device();
    const key = newKey();
    const left = draft({ effDirect: 0.8, hours: '8-', caps: { roomRhPct: null } });
    expect(keepDraft(key, left, storage)).toBe(true);
    expect(findDraft(key, storage)).toEqual(left);
  });

  test('belongs to its person and its brief', () => {
    const storage = device();
    const key = newKey();
    keepDraft(key, draft({ effDirect: 0.8 }), storage);
    expect(findDraft({ ...key, personId: 'ben' }, storage)).toBeNull();
    expect(findDraft({ ...key, briefId: 'another' }, storage)).toBeNull();
  });

  test('is gone once it is dropped', () => {
    const storage = device();
    const key = newKey();
    keepDraft(key, draft({ effDirect: 0.8 }), storage);
    dropDraft(key, storage);
    expect(findDraft(key, storage)).toBeNull();
    expect(storage.held.size).toBe(0);
  });

  test('stays until the page is loaded anew where the device keeps nothing, and says that it will not outlast it', () => {
    for (const storage of [device({ full: true }), null]) {
      const key = newKey();
      const left = draft({ effDirect: 0.8 });
      expect(keepDraft(key, left, storage)).toBe(false);
      expect(findDraft(key, storage)).toEqual(left);
    }
  });

  test.each(['', '{', 'null', '[]', '{"values":3}', '{"values":{},"basedOn":"3","keptAt":""}'])(
    'that the device holds as %s is none',
    (text) => {
      const storage = device();
      const key = newKey();
      storage.held.set(`muslin.draft.${key.personId}.${key.briefId}`, text);
      expect(findDraft(key, storage)).toBeNull();
    },
  );

  test('comes back as values of today’s form: fields that it lacks as saved, fields that are no more left behind', () => {
    const office = presetBrief('office');
    const restored = restoredDraft({ cycles: 'six', smoke: 35 }, office);
    expect(restored).toEqual({ ...draftOf(office), cycles: 'six' });
  });
});
