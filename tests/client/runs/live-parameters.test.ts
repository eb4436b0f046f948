import { describe, expect, it } from 'vitest';
import { readBrief } from '../../../src/engine/brief/brief-from-preset.ts';
import {
  bodyOfLiveDraft,
  changed,
  draftWords,
  type LiveParameter,
  liveParameters,
  printLiveDraft,
  readLiveDraft,
} from '../../../src/features/runs/live-parameters.ts';
import { presetBrief, presetNames } from '../../support/presets.ts';

const bodyOf = (id: string) => presetBrief(id);
const parametersOf = (id: string) => liveParameters(bodyOf(id));
const named = (parameters: readonly LiveParameter[], path: string) => {
  const found = parameters.find((parameter) => parameter.path === path);
  if (found === undefined) throw new Error(`no ${path}`);
  return found;
};

describe('the parameters that the map offers', () => {
  it('are those of the use: stages, set-point, cap, load and hours', () => {
    const paths = (id: string) => parametersOf(id).map(({ path }) => path);
    expect(paths('office')).toEqual(['effDirect', 'effIndirect', 'limit.tempC', 'caps.roomRhPct', 'dTroomK', 'hours']);
    expect(paths('clinic')).toEqual([
      'effIndirect',
      'effDewPoint',
      'limit.tempC',
      'caps.roomRhPct',
      'dTroomK',
      'hours',
    ]);
    expect(paths('process-water').slice(0, 3)).toEqual(['limit.approachK', 'limit.coldC', 'limit.rangeK']);
    expect(paths('broiler')).not.toContain('caps.roomRhPct');
    expect(paths('glasshouse')).not.toContain('hours');
  });

  it.each(presetNames)('of %s have a unit, and a slider that holds the saved value', (id) => {
    const parameters = parametersOf(id);
    expect(parameters.length).toBeGreaterThan(0);
    for (const parameter of parameters) {
      if (parameter.kind === 'hours') continue;
      expect(parameter.unit, parameter.path).not.toBe('');
      const shown = parameter.saved * parameter.scale;
      expect(parameter.min).toBeLessThanOrEqual(shown + 1e-9);
      expect(parameter.max).toBeGreaterThanOrEqual(shown - 1e-9);
    }
  });

  it.each(presetNames)('of %s go no further than the engine takes a number', (id) => {
    const body = bodyOf(id);
    const faults = liveParameters(body).flatMap((parameter) => {
      const ends = parameter.kind === 'hours' ? ['0-24', '9-10'] : [parameter.min, parameter.max];
      return ends.flatMap((end) => {
        const value = typeof end === 'number' && parameter.kind === 'number' ? end / parameter.scale : end;
        const reading = readBrief(bodyOfLiveDraft(body, { [parameter.path]: value }));
        return reading.ok ? [] : reading.faults.map(({ message }) => `${parameter.path} ${end}: ${message}`);
      });
    });
    // Two fields may contradict each other, which the page says; a number out of its own range may not be offered.
    expect(faults.filter((fault) => /is needed/.test(fault))).toEqual([]);
  });
});

describe('a draft of the sliders', () => {
  const parameters = parametersOf('office');
  const draft = { 'caps.roomRhPct': 55, effDirect: 0.75, hours: '7-20' };

  it('is written into an address and read from it', () => {
    expect(printLiveDraft(draft)).toBe('caps.roomRhPct:55,effDirect:0.75,hours:7-20');
    expect(readLiveDraft(printLiveDraft(draft), parameters)).toEqual(draft);
    expect(printLiveDraft({})).toBeNull();
  });

  it('leaves out of an address what the brief does not have, what is no number and what is as it was saved', () => {
    expect(readLiveDraft('effDewPoint:0.5,effDirect:warm,dTroomK:,hours:20-7,limit.tempC:26', parameters)).toEqual({});
    expect(readLiveDraft('nonsense', parameters)).toEqual({});
  });

  it('changes the brief in its place and nothing else', () => {
    const body = bodyOf('office');
    const made = bodyOfLiveDraft(body, draft);
    expect(made).toEqual({ ...body, effDirect: 0.75, hours: '7-20', caps: { ...body.caps, roomRhPct: 55 } });
    expect(body.caps.roomRhPct).toBe(65);
  });

  it('says in words what differs, the saved value in brackets, and a value put back is no difference', () => {
    expect(draftWords(parameters, draft)).toBe(
      'direct effectiveness 75\u00a0% (85\u00a0%), room humidity, at most 55\u00a0% RH (65\u00a0% RH) and open 7 to 20\u00a0h (8 to 18\u00a0h)',
    );
    expect(changed(draft, named(parameters, 'effDirect'), 0.85)).toEqual({ 'caps.roomRhPct': 55, hours: '7-20' });
  });
});
