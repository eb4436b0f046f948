import { describe, expect, test } from 'vitest';
import { decodeText, textBetween } from '#engine/weather-files/text/decode-text.ts';
import { LineCursor } from '#engine/weather-files/text/line-cursor.ts';
import { NOT_A_NUMBER, numberField } from '#engine/weather-files/text/number-field.ts';
import { bytesOf, epwBytes, epwText } from '../../support/epw-text.ts';
import { findingsOf, readUsable, remarkable } from '../../support/readings.ts';

function latin1(text: string): Uint8Array {
  return Uint8Array.from(text, (char) => char.charCodeAt(0));
}

function utf16(text: string, order: 'little' | 'big'): Uint8Array {
  const bytes = new Uint8Array(2 * text.length + 2);
  const view = new DataView(bytes.buffer);
  view.setUint16(0, 0xfeff, order === 'little');
  for (let at = 0; at < text.length; at++) view.setUint16(2 * at + 2, text.charCodeAt(at), order === 'little');
  return bytes;
}

function whole(bytes: Uint8Array): string {
  const text = decodeText(bytes);
  if ('notText' in text) throw new Error(text.notText);
  return textBetween(text, 0, text.bytes.length);
}

describe('bytes to text', () => {
  const sentence = 'Température à Orléans, 25 °C, ☀ and 𝛑';

  test('UTF-8 with and without its mark, and UTF-16 of both orders, give the same text', () => {
    expect(whole(bytesOf(sentence))).toBe(sentence);
    expect(whole(Uint8Array.of(0xef, 0xbb, 0xbf, ...bytesOf(sentence)))).toBe(sentence);
    expect(whole(utf16(sentence, 'little'))).toBe(sentence);
    expect(whole(utf16(sentence, 'big'))).toBe(sentence);
  });

  test('agrees with the decoder of the platform on what is UTF-8 and what it says', () => {
    const strict = new TextDecoder('utf-8', { fatal: true });
    let refused = 0;
    for (let seed = 0; seed < 4000; seed++) {
      const bytes = Uint8Array.from(
        [0, 1, 2, 3],
        (place) => 0x41 + (((seed * 2654435761 + place * 40503 * seed) >>> 7) % 0xbf),
      );
      const text = decodeText(bytes);
      if ('notText' in text) continue;
      let valid = true;
      try {
        strict.decode(bytes);
      } catch {
        valid = false;
        refused++;
      }
      expect(text.windows1252, bytes.join(' ')).toBe(!valid);
      if (valid) expect(whole(bytes)).toBe(strict.decode(bytes));
    }
    expect(refused).toBeGreaterThan(1000);
  });

  test('overlong forms, surrogates and code points beyond the last are not UTF-8', () => {
    for (const bytes of [
      [0xc0, 0x80],
      [0xe0, 0x9f, 0x80],
      [0xed, 0xa0, 0x80],
      [0xf0, 0x8f, 0x80, 0x80],
      [0xf4, 0x90, 0x80, 0x80],
      [0xe2, 0x82],
    ]) {
      const text = decodeText(Uint8Array.from([0x41, ...bytes]));
      expect('windows1252' in text && text.windows1252, bytes.join(' ')).toBe(true);
    }
  });

  test('Windows-1252 gives the characters of its table, which differ from Latin-1 between 80 and 9F', () => {
    // Code page 1252 as published by its maker (from memory).
    const bytes = Uint8Array.of(0x80, 0x85, 0x91, 0x92, 0x95, 0x96, 0x99, 0x9f, 0xa0, 0xb0, 0xe9, 0xff);
    expect(whole(bytes)).toBe('€…‘’•–™Ÿ\u00a0°éÿ');
  });

  test('zero bytes and more than 1 % of control characters are no text; tabs, form feeds and a closing Ctrl-Z are', () => {
    expect(decodeText(bytesOf('LOCATION,\n1\u0000'))).toMatchObject({ notText: 'nul', line: 2 });
    expect(decodeText(bytesOf(`${'a'.repeat(90)}\u0001`))).toMatchObject({ notText: 'control' });
    expect(decodeText(bytesOf(`${'a'.repeat(110)}\u0001`))).toMatchObject({ windows1252: false });
    expect(decodeText(bytesOf('a\tb\f\n\u001a'))).toMatchObject({ windows1252: false });
  });
});

describe('encodings of a whole file', () => {
  test('Latin-1 is read with a note that names the line; UTF-8 without any', () => {
    const text = epwText({ location: 'Orléans,-,FRA,-,-,47.9,1.9,1,337' });
    const reading = readUsable(latin1(text));
    expect(reading.station.name).toBe('Orléans');
    expect(findingsOf(reading, 'encoding')).toEqual([expect.objectContaining({ severity: 'note', line: 1 })]);
    const utf8 = readUsable(bytesOf(text));
    expect(utf8.station.name).toBe('Orléans');
    expect(remarkable(utf8)).toEqual([]);
  });

  test('UTF-16 is read with a note', () => {
    expect(remarkable(readUsable(utf16(epwText(), 'little')))).toEqual(['encoding note']);
  });

  test('LF, CRLF, CR and mixtures, blank lines, a mark and a missing final line end give the same hours', () => {
    const text = epwText();
    const plain = readUsable(epwBytes());
    const variants = {
      crlf: text.replaceAll('\n', '\r\n'),
      cr: text.replaceAll('\n', '\r'),
      mixed: text.replace(/\n/g, (_end, at: number) => ['\n', '\r\n', '\r'][at % 3] ?? '\n'),
      blanks: text.replace(/\n/g, (_end, at: number) => (at % 5 === 0 ? '\n\n \t\n' : '\n')),
      'no final line end': text.trimEnd(),
      'closing Ctrl-Z': `${text}\u001a`,
      mark: `\ufeff${text}`,
    };
    for (const [name, variant] of Object.entries(variants)) {
      const reading = readUsable(bytesOf(variant));
      expect(remarkable(reading), name).toEqual([]);
      expect([...reading.hours.dryBulbC], name).toEqual([...plain.hours.dryBulbC]);
    }
  });
});

test('lines are counted physically, whatever their ends, and blank ones are skipped', () => {
  const text = decodeText(bytesOf('one\r\n\r\ntwo\rthree\n\n \nfour'));
  if ('notText' in text) throw new Error('text');
  const cursor = new LineCursor(text);
  const seen: [number, string, boolean][] = [];
  while (cursor.next()) seen.push([cursor.line, cursor.string(20), cursor.closed]);
  expect(seen).toEqual([
    [1, 'one', true],
    [3, 'two', true],
    [4, 'three', true],
    [7, 'four', false],
  ]);
});

test('numbers are those of the language to the last bit, and nothing else is one', () => {
  const numbers = [
    '0',
    '-0.0',
    '12.5',
    '+3',
    '.5',
    '7.',
    '99999999999999999999',
    '1e3',
    '-1.25E-2',
    '0.1',
    '101325.00',
    '123456789.012345678',
  ];
  for (const word of numbers) {
    const text = decodeText(bytesOf(` ${word}\t`));
    if ('notText' in text) throw new Error('text');
    expect(numberField(text, 0, text.bytes.length), word).toBe(Number(word));
  }
  for (const word of [
    '1,5',
    '--1',
    '1-',
    '1.2.3',
    'e5',
    '.',
    '-',
    '0x10',
    'Infinity',
    '1 2',
    '1e999',
    '5'.repeat(41),
  ]) {
    const text = decodeText(bytesOf(word));
    if ('notText' in text) throw new Error('text');
    expect(numberField(text, 0, text.bytes.length), word).toBe(NOT_A_NUMBER);
  }
});
