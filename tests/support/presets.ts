import { readFileSync } from 'node:fs';
import type { Brief } from '#engine/brief/brief.ts';
import { briefFromPreset } from '#engine/brief/brief-from-preset.ts';

const file: { presets: readonly Readonly<Record<string, unknown>>[] } = JSON.parse(
  readFileSync(new URL('../../data/presets/presets.json', import.meta.url), 'utf8'),
);

/** Names of the presets that ship, in the file's order. */
export const presetNames: readonly string[] = file.presets.map((preset) => String(preset.id));

/** A preset as the file holds it. */
export function rawPreset(name: string): Readonly<Record<string, unknown>> {
  const preset = file.presets.find(({ id }) => id === name);
  if (preset === undefined) throw new Error(`no preset of the name ${name}`);
  return preset;
}

/** A preset as a brief, with fields changed. */
export function presetBrief(name: string, changes: Partial<Brief> = {}): Brief {
  return { ...briefFromPreset(rawPreset(name)), ...changes };
}
