import { readFileSync } from 'node:fs';
import type { Brief } from '#engine/brief/brief.ts';
import { briefFromPreset } from '#engine/brief/brief-from-preset.ts';

const PRESETS_FILE = new URL('../../../data/presets/presets.json', import.meta.url);

let presets: ReadonlyMap<string, unknown> | null = null;

/** The brief of a preset that ships. @throws Error when none has that name */
export function presetBrief(id: string): Brief {
  presets ??= readPresets();
  const preset = presets.get(id);
  if (preset === undefined) throw new Error(`no preset is called ${id}; there are ${[...presets.keys()].join(', ')}`);
  return briefFromPreset(preset);
}

/** The presets that ship, in their own order. */
export function presetNames(): readonly string[] {
  presets ??= readPresets();
  return [...presets.keys()];
}

/** What a new programme begins with. */
export function officeBrief(): Brief {
  return presetBrief('office');
}

function readPresets(): ReadonlyMap<string, unknown> {
  const file: { presets: { id: string }[] } = JSON.parse(readFileSync(PRESETS_FILE, 'utf8'));
  return new Map(file.presets.map((preset) => [preset.id, preset]));
}
