import { describe, expect, it } from 'vitest';
import { foundSuggestions, isName, readTyped } from '../../../src/features/places/place-suggestions.ts';

describe('what was typed into the search box', () => {
  it('is looked up when it is a name, and read when it is a position', () => {
    expect([isName('Gaborone'), isName('29 Palms'), isName('G'), isName(' '), isName('-24.6, 25.9')]).toEqual([
      ...[true, true, false, false, false],
    ]);
    expect(readTyped('-24,65; 25,91')).toEqual({
      suggestions: [
        {
          ...{ key: 'point', name: '24.65°\u00a0S, 25.91°\u00a0E', note: 'position', place: null },
          ...{ latitude: -24.65, longitude: 25.91 },
        },
      ],
      problem: null,
    });
    expect(readTyped('Gaborone')).toEqual({ suggestions: [], problem: null });
  });

  it('is offered the other way round where its angles seem swapped, with what is wrong', () => {
    const { suggestions, problem } = readTyped('-115.15, 36.08');
    expect(problem).toMatch(/^A latitude lies between -90 and 90 degrees/);
    expect(suggestions).toMatchObject([{ note: 'the other way round', latitude: 36.08, longitude: -115.15 }]);
    expect(readTyped('90.1 N, 20 E')).toMatchObject({ suggestions: [], problem: expect.stringMatching(/90\.1/) });
  });

  it('finds stations and sites to be chosen, and places to be pointed at', () => {
    const at = { latitude: 1, longitude: 2 };
    const own = { ...at, name: 'Redpan', country: null };
    const suggestions = foundSuggestions([
      {
        ...own,
        kind: 'site',
        id: '00000000-0000-4000-8000-000000000001',
        programmeId: '00000000-0000-4000-8000-000000000002',
      },
      { ...at, kind: 'capital', id: null, programmeId: null, name: 'Paris', country: 'France' },
      { ...at, kind: 'place', id: null, programmeId: null, name: 'Paris', country: 'Canada' },
    ]);
    expect(suggestions.map(({ note }) => note)).toEqual(['site', 'capital, France', 'place, Canada']);
    expect(suggestions.map(({ place }) => place?.kind ?? null)).toEqual(['site', null, null]);
    expect(new Set(suggestions.map(({ key }) => key)).size).toBe(3);
  });
});
