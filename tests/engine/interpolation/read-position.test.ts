import { describe, expect, test } from 'vitest';
import { readAngle } from '#engine/interpolation/read-angle.ts';
import { readPosition } from '#engine/interpolation/read-position.ts';

/** Gaborone to 7 decimals of a degree, about a centimetre. */
const LATITUDE = -(24 + 39 / 60 + 11.52 / 3600);
const LONGITUDE = 25 + 54 / 60 + 24.48 / 3600;

describe('a position is read in any usual form', () => {
  test.each([
    '-24.6532, 25.9068',
    '-24.6532 25.9068',
    '-24.6532;25.9068',
    '−24,6532; 25,9068',
    '-24,6532 25,9068',
    '-24,6532, 25,9068',
    '-24,6532,25,9068',
    '24.6532 S, 25.9068 E',
    '24.6532S25.9068E',
    'S24.6532 E25.9068',
    '25.9068 E, 24.6532 S',
    'E 25.9068 S 24.6532',
    '24,6532 S 25,9068 E',
    '24° 39\' 11.52" S, 25° 54\' 24.48" E',
    '24°39′11.52″S 25°54′24.48″E',
    "24º39’11,52''S 25º54’24,48''E",
    '24 39 11.52 S 25 54 24.48 E',
    'S 24 39 11.52, E 25 54 24.48',
    '-24 39 11.52, 25 54 24.48',
    '-24:39:11.52 25:54:24.48',
    '24d39m11.52s S, 25d54m24.48s E',
    "24° 39.192' S 25° 54.408' E",
    '-24°39.192 25°54.408',
    '24 deg 39 min 11.52 sec south, 25 deg 54 min 24.48 sec east',
    'Lat -24.6532 Lon 25.9068',
    'longitude: 25.9068, latitude: -24.6532',
    '(-24.6532, 25.9068)',
    'geo:-24.6532,25.9068',
    'geo:-24.6532,25.9068;crs=wgs84',
    'POINT(25.9068 -24.6532)',
    '-24.6532+025.9068/',
    '-2439.192+02554.408/',
    '-243911.52+0255424.48CRSWGS_84/',
    '  -24.6532 ,\t25.9068 ',
  ])('%s', (written) => {
    const read = readPosition(written);
    expect(read.kind).toBe('position');
    if (read.kind !== 'position') return;
    expect(read.position.latitude).toBeCloseTo(LATITUDE, 7);
    expect(read.position.longitude).toBeCloseTo(LONGITUDE, 7);
  });

  test('whole degrees with one comma are two angles, not one with decimals', () => {
    expect(readPosition('33,18')).toEqual({ kind: 'position', position: { latitude: 33, longitude: 18 } });
    expect(readPosition('-33,-18')).toEqual({ kind: 'position', position: { latitude: -33, longitude: -18 } });
  });

  test('the poles and the date line are positions', () => {
    expect(readPosition('90, -180')).toEqual({ kind: 'position', position: { latitude: 90, longitude: -180 } });
    expect(readPosition('0, 0')).toEqual({ kind: 'position', position: { latitude: 0, longitude: 0 } });
  });
});

describe('what is no position is refused with its reason', () => {
  test.each([
    ['90.1, 20', 'A latitude lies between -90 and 90 degrees, and this is 90.1.'],
    ['20, 180.5', 'A longitude lies between -180 and 180 degrees, and this is 180.5.'],
    ['20 S, 30 N', 'Both angles are of latitude.'],
    ['-20 S, 30 E', 'has both a sign and a letter'],
    ['20 61 0, 30 0 0', 'minutes and seconds are less than 60'],
    ['20.5 30, 30 0', 'only the last of degrees, minutes and seconds may have decimals'],
    ['20, 30, 40', 'Write latitude and longitude with a comma between'],
    ['20 30 40', 'Write latitude and longitude with a comma between'],
    ['20 N 30 O', 'The letter O stands for east in some languages and for west in others'],
    ['118.25 N, 34 E', 'A latitude lies between -90 and 90 degrees'],
  ])('%s', (written, problem) => {
    const read = readPosition(written);
    expect(read).toMatchObject({ kind: 'fault' });
    if (read.kind === 'fault') expect(read.problem).toContain(problem);
  });

  test('swapped angles are suspected and offered the other way round, never turned by themselves', () => {
    expect(readPosition('-115.15, 36.08')).toEqual({
      kind: 'fault',
      problem:
        'A latitude lies between -90 and 90 degrees, and this is -115.15. Latitude comes first; are the two swapped?',
      swapped: { latitude: 36.08, longitude: -115.15 },
    });
    // With letters nothing is swapped: the angle is wrong.
    expect(readPosition('115 N 36 E')).toMatchObject({ kind: 'fault', swapped: null });
    expect(readPosition('120, 100')).toMatchObject({ kind: 'fault', swapped: null });
  });

  test.each(['Gaborone', '29 Palms', 'São Paulo', 'Route 66, 5', '', '24', '=cmd|1 2', 'Nowhere', '🙂 1 2'])(
    '“%s” is words',
    (written) => expect(readPosition(written)).toEqual({ kind: 'words' }),
  );
});

describe('one angle of a column', () => {
  test.each([
    ['33,45', 33.45],
    ['-33.45', -33.45],
    ["33°27' S", -33.45],
    ['S33.45', -33.45],
    ['-0', 0],
  ])('%s', (written, degrees) => {
    const read = readAngle(written, 'latitude');
    expect('angle' in read ? read.angle.degrees : read.fault).toBeCloseTo(degrees, 9);
  });

  test.each([
    ['18 E', 'is a longitude; a latitude is asked for here'],
    ['91', 'A latitude lies between -90 and 90 degrees, and this is 91'],
    ['', 'is not an angle'],
    ['=1+1', 'is not an angle'],
    ['12 N 5 S', 'names more than one point of the compass'],
  ])('“%s” is refused', (written, problem) => {
    const read = readAngle(written, 'latitude');
    expect('fault' in read ? read.fault : '').toContain(problem);
  });
});
