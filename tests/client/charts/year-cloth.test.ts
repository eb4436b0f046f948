import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { channelsOf, classPaint, HAIRLINE_COLOUR } from '../../../src/charts/hour-class-colours.ts';
import { daysOf, yearCloth } from '../../../src/charts/year-cloth.ts';
import { hourClasses } from '../../../src/engine/hour-classes/hour-class.ts';
import { lightnessOf } from '../../support/lightness.ts';

const code = (hourClass: (typeof hourClasses)[number]) => hourClasses.indexOf(hourClass);

function pixelAt(cloth: ReturnType<typeof yearCloth>, { x, y }: { x: number; y: number }): number[] {
  const at = (y * cloth.widthPx + x) * 4;
  return [...cloth.pixels.slice(at, at + 4)];
}

const opaque = (colour: string) => [...channelsOf(colour), 255];

describe('yearCloth', () => {
  it('gives four bytes for each pixel of the picture that was asked for', () => {
    const cloth = yearCloth({ codes: new Uint8Array(8760), widthPx: 1095, heightPx: 144, threadPx: 1 });
    expect([cloth.widthPx, cloth.heightPx, cloth.pixels.length]).toEqual([1095, 144, 1095 * 144 * 4]);
  });

  it('has a column for every day and a row for every hour, hour 1 at the top', () => {
    const codes = new Uint8Array(8760).fill(code('direct'));
    codes[0] = code('air');
    codes[23] = code('twostage');
    codes[364 * 24] = code('dewpoint');
    const cloth = yearCloth({ codes, widthPx: 365, heightPx: 24, threadPx: 1 });
    expect(pixelAt(cloth, { x: 0, y: 0 })).toEqual(opaque(classPaint.air.base));
    expect(pixelAt(cloth, { x: 0, y: 23 })).toEqual(opaque(classPaint.twostage.base));
    expect(pixelAt(cloth, { x: 364, y: 0 })).toEqual(opaque(classPaint.dewpoint.base));
    expect(pixelAt(cloth, { x: 200, y: 12 })).toEqual(opaque(classPaint.direct.base));
  });

  it('has 366 columns in a leap year', () => {
    const codes = new Uint8Array(8784).fill(code('direct'));
    codes[365 * 24] = code('air');
    expect(daysOf(codes)).toBe(366);
    const cloth = yearCloth({ codes, widthPx: 366, heightPx: 24, threadPx: 1 });
    expect(pixelAt(cloth, { x: 365, y: 0 })).toEqual(opaque(classPaint.air.base));
  });

  it('paints every hour in the ground or the thread of its class, at any size', () => {
    fc.assert(
      fc.property(
        fc.uint8Array({ minLength: 8760, maxLength: 8760, max: hourClasses.length - 1 }),
        fc.record({
          widthPx: fc.integer({ min: 365, max: 900 }),
          heightPx: fc.integer({ min: 24, max: 120 }),
          threadPx: fc.integer({ min: 1, max: 3 }),
        }),
        fc.array(fc.record({ x: fc.nat(), y: fc.nat() }), { minLength: 20, maxLength: 20 }),
        (codes, size, points) => {
          const cloth = yearCloth({ codes, ...size });
          for (const point of points) {
            const x = point.x % size.widthPx;
            const y = point.y % size.heightPx;
            const day = Math.floor(((x + 0.5) * 365) / size.widthPx);
            const hour = Math.floor(((y + 0.5) * 24) / size.heightPx);
            const hourClass = hourClasses[codes[day * 24 + hour] ?? -1];
            if (!hourClass) throw new Error('The sample points outside the year.');
            const { base, thread } = classPaint[hourClass];
            const allowed = [base, thread, ...(['closed', 'idle'].includes(hourClass) ? [HAIRLINE_COLOUR] : [])];
            expect(allowed.map(opaque)).toContainEqual(pixelAt(cloth, { x, y }));
          }
        },
      ),
      { numRuns: 20 },
    );
  });

  it('draws a hairline where closed meets idle, and nowhere else', () => {
    const codes = new Uint8Array(8760).fill(code('closed'));
    for (let slot = 0; slot < codes.length; slot += 1) if (slot % 24 >= 8 && slot % 24 < 18) codes[slot] = code('idle');
    const cloth = yearCloth({ codes, widthPx: 365, heightPx: 96, threadPx: 1 });
    const lines = Array.from({ length: 96 }, (_, y) => y).filter(
      (y) => String(pixelAt(cloth, { x: 100, y })) === String(opaque(HAIRLINE_COLOUR)),
    );
    expect(lines).toEqual([32, 72]);
  });

  it('stays readable in grey: a met half and an unmet half differ by at least 20 L* on average', () => {
    const codes = Uint8Array.from({ length: 8760 }, (_, slot) => code(slot < 4380 ? 'twostage' : 'damp'));
    const cloth = yearCloth({ codes, widthPx: 730, heightPx: 48, threadPx: 1 });
    const meanLightness = (from: number, to: number) => {
      let sum = 0;
      for (let x = from; x < to; x += 1) {
        for (let y = 0; y < 48; y += 1) {
          const [red = 0, green = 0, blue = 0] = pixelAt(cloth, { x, y });
          sum += lightnessOf(`#${[red, green, blue].map((value) => value.toString(16).padStart(2, '0')).join('')}`);
        }
      }
      return sum / ((to - from) * 48);
    };
    expect(meanLightness(0, 64) - meanLightness(600, 664)).toBeGreaterThanOrEqual(20);
  });

  it('names what is wrong with hours that are no year, or hold no class', () => {
    const size = { widthPx: 365, heightPx: 24, threadPx: 1 };
    expect(() => yearCloth({ codes: new Uint8Array(8759), ...size })).toThrow('8760 or 8784 hours; 8759');
    expect(() => yearCloth({ codes: new Uint8Array(8760).fill(12), ...size })).toThrow('Slot 0 holds 12');
  });
});
