import { describe, expect, it } from 'vitest';
import { type DroppedEntry, filesOfEntries } from '../../../src/features/weather/dropped-files.ts';

const file = (name: string) => ({
  name,
  isDirectory: false,
  file: (found: (file: File) => void) => found(new File(['weather'], name)),
});

/** A folder that hands out two entries at a time, as browsers hand out a hundred. */
function folder(name: string, entries: DroppedEntry[]): DroppedEntry {
  const createReader = () => {
    const left = [...entries];
    return { readEntries: (found: (portion: DroppedEntry[]) => void) => found(left.splice(0, 2)) };
  };
  return Object.assign({ name, isDirectory: true }, { createReader });
}

describe('what is dropped', () => {
  it('is opened with all folders in it, file by file in the order of names, without what systems leave there', async () => {
    const north = folder('north', [file('station 10.epw'), file('station 9.epw'), file('.DS_Store'), file('a.csv')]);
    const all = folder('all', [file('z.epw'), north, folder('empty', []), file('Thumbs.db')]);
    const files = await filesOfEntries([all, file('single.epw')]);
    expect(files.map(({ name }) => name)).toEqual(['a.csv', 'station 9.epw', 'station 10.epw', 'z.epw', 'single.epw']);
  });

  it('is refused whole when a folder cannot be opened', async () => {
    const locked = Object.assign(folder('locked', []), {
      createReader: () => ({
        readEntries: (_found: unknown, failed: (error: unknown) => void) => failed(new Error('not allowed')),
      }),
    });
    await expect(filesOfEntries([file('one.epw'), locked])).rejects.toThrow('not allowed');
  });
});
