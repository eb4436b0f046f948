/** Invented data for the gallery: each state that a component has to show, in shapes of the contract. One list, and long for it. */
import type { Membership } from '../../contract/accounts.ts';
import type { Place } from '../../contract/place.ts';
import type { MapStation, ProgrammeMap } from '../../contract/programme-map.ts';
import type { Ledger } from '../../contract/runs.ts';
import type { FileStatus, WeatherFile, WeatherFileRecord } from '../../contract/weather.ts';
import { SLOTS_PER_YEAR } from '../../engine/conventions.ts';
import { type HourClass, hourClasses } from '../../engine/hour-classes/hour-class.ts';

/** Ids that differ in their last digits only. */
export function fixtureId(index: number): string {
  return `00000000-0000-4000-8000-${String(index).padStart(12, '0')}`;
}

export const fixtureTeam: Membership = {
  teamId: fixtureId(1),
  teamName: 'Veldway Schools',
  role: 'engineer',
  invented: true,
  programmes: [{ id: fixtureId(2), name: 'School halls' }],
};

/** A year with every class in it: open 8 to 18, demand in the warm part of the day, humid spells in January. */
export function fixtureHours(): Uint8Array {
  const code = (hourClass: HourClass) => hourClasses.indexOf(hourClass);
  return Uint8Array.from({ length: SLOTS_PER_YEAR }, (_, slot) => {
    const day = Math.floor(slot / 24);
    const hour = (slot % 24) + 1;
    const summer = 0.5 + 0.5 * Math.cos((2 * Math.PI * (day - 15)) / 365);
    const warmth = summer * 16 + 6 * Math.cos((2 * Math.PI * (hour - 15)) / 24) + 2 * Math.sin(day * 1.7);
    if (hour <= 8 || hour > 18) return code('closed');
    if (day >= 120 && day < 122) return code('missing');
    if (day >= 185 && day < 195 && hour < 11) return code('frozen');
    if (warmth < 4) return code('idle');
    if (warmth < 7) return code('air');
    if (summer > 0.86 && Math.sin(day / 3) > 0.5) return code('damp');
    if (warmth < 15) return code('direct');
    if (warmth < 18) return code(day % 2 ? 'indirect' : 'dewpoint');
    if (warmth < 21) return code('twostage');
    return code(warmth < 22.5 ? 'short' : 'beyond');
  });
}

export function fixtureLedger(codes: Uint8Array): Ledger {
  const counts = hourClasses.map(
    (hourClass, code) => [hourClass, codes.filter((value) => value === code).length] as const,
  );
  const classes: Record<HourClass, number> = {
    ...{ closed: 0, missing: 0, idle: 0, frozen: 0, damp: 0, air: 0 },
    ...{ direct: 0, indirect: 0, dewpoint: 0, twostage: 0, short: 0, beyond: 0 },
    ...Object.fromEntries(counts),
  };
  const demand = codes.length - classes.closed - classes.missing - classes.idle;
  const met = classes.air + classes.direct + classes.indirect + classes.dewpoint + classes.twostage;
  const dampPlant = Math.floor(classes.damp / 5);
  return { hours: codes.length, classes, dampOutside: classes.damp - dampPlant, dampPlant, demand, met };
}

const names = [
  ...['Korrel Pan', 'Tallgrass', 'Aloe Flat', 'White Ridge', 'Marula Gap', 'Reedford', 'Dunefoot', 'Lantern Bay'],
  ...['Cane Coast', 'Twin Kopjes', 'Gannet Point', 'Ashveld', 'Stillwater Drift', 'Harrow Nek', 'Bokpoort Siding'],
];

function yearFigures(index: number) {
  const judged = index < 13;
  const met = 2200 - index * 90;
  const classes = [5600, 0, 500, 0, 160, 900, met - 900, 0, 0, 0, 1500 - met / 2, 1000 - met / 2];
  return {
    words: judged ? (index < 2 ? 'most' : 'some') : null,
    yearsMeeting: index < 3 ? 1 : 0,
    yearsCounted: judged ? 1 : 0,
    range: null,
    ledger: judged ? { classes, demand: 2660, met } : null,
    litresPerKwh: judged ? 1.2 + index / 10 : null,
    savedPct: judged ? 62 - index * 3 : null,
    worstSpellHours: judged ? 14 + index * 6 : null,
    severityKh: judged ? 120 + index * 80 : null,
  };
}

export function fixtureStations(): MapStation[] {
  return names.map((name, index) => ({
    id: fixtureId(100 + index),
    name,
    latitude: -33 + ((index * 7) % 15),
    longitude: 18 + ((index * 5) % 14),
    elevationM: 40 + ((index * 397) % 1600),
    score: index === 13 || index === 14 ? null : Math.max(3, 91 - index * 7),
    scoreNote:
      index === 13 ? 'excluded: weather for 62 % of the hours in schedule' : index === 14 ? 'not judged yet' : null,
    grade: index === 12 ? 'D' : 'C',
    verdict: index > 12 ? null : index < 3 ? 'meets the brief' : 'does not',
    ...yearFigures(index),
  }));
}

const brief = {
  briefId: fixtureId(3),
  briefVersionId: fixtureId(4),
  name: 'Office',
  version: 1,
  preset: 'office',
  sentence: '26 °C room, at most 65 % relative humidity, open 8 to 18 on weekdays.',
  methodVersion: '2026.2',
};

export function fixtureMap(): ProgrammeMap {
  const [programme = { id: fixtureId(2), name: 'School halls' }] = fixtureTeam.programmes;
  return { programme, invented: true, brief, stations: fixtureStations(), sites: [], pending: 1 };
}

export function fixturePlace(station: MapStation): Place {
  const codes = fixtureHours();
  const part = (component: string, label: string, unit: string) => ({ component, label, unit });
  const score = station.score;
  return {
    site: null,
    station: { ...station, zone: 'Africa/Johannesburg' },
    invented: true,
    brief,
    years: [
      {
        runId: fixtureId(5),
        weatherFileId: fixtureId(200),
        kind: 'typical',
        year: null,
        hours: 8760,
        score,
      },
    ],
    judgedYears: [],
    derived: [],
    shown: {
      runId: fixtureId(5),
      ledger: fixtureLedger(codes),
      verdict: score !== null && score > 75 ? 'meets the brief' : 'does not',
      tolerances: [
        { tolerance: 'unmet share of demand hours', found: 9.7, allowed: 5, unit: '%', holds: false },
        { tolerance: 'worst spell', found: 61, allowed: 24, unit: 'h', holds: false },
      ],
      gates: [
        { gate: 'water available', answer: 'not known', note: 'to be answered for the site' },
        { gate: 'coverage', answer: 'pass', note: 'weather for 2,540 of 2,560 hours in schedule, 99.2 %' },
      ],
      score,
      scoreNote: station.scoreNote,
      scoreExact: score,
      geometricMean: score === null ? null : score - 6.3,
      words: 'much',
      parts: [
        {
          ...part('served', 'Demand hours served', '%'),
          raw: 90.3,
          a0: 70,
          a100: 99,
          normalised: 70,
          weight: 30,
          points: 21,
        },
        {
          ...part('severity', 'Severity', 'K h per 1000 demand hours'),
          raw: 48.2,
          a0: 300,
          a100: 0,
          normalised: 83.9,
          weight: 10,
          points: 8.39,
        },
        { ...part('spell', 'Worst spell', 'h'), raw: 61, a0: 240, a100: 0, normalised: 74.6, weight: 10, points: 7.46 },
        {
          ...part('damp', 'Demand hours too damp', '%'),
          raw: 9.7,
          a0: 40,
          a100: 0,
          normalised: 75.8,
          weight: 10,
          points: 7.58,
        },
        {
          ...part('water', 'Make-up water', 'L/kWh'),
          raw: 1.62,
          a0: 5,
          a100: 0.5,
          normalised: 75.1,
          weight: 15,
          points: 11.27,
        },
        {
          ...part('electricity', 'Electricity saved', '%'),
          raw: null,
          a0: 0,
          a100: 60,
          normalised: null,
          weight: 0,
          points: null,
        },
      ],
      worstSpell: {
        hours: 61,
        start: '22 Jan 13:00',
        end: '27 Jan 18:00',
        severityKh: 84.2,
        worstK: 3.1,
        cutAtJoint: true,
      },
      severityKh: 201,
      water: { makeUpLitres: 2120, litresPerKwh: 1.62, peakDayLitres: 24.1, peakDay: '14 Jan' },
      electricity: { kwh: 312, referenceKwh: 641, savedPct: 51.3, peakKw: 0.38, referencePeakKw: 0.46 },
      money: null,
      moneyNote: 'not priced: the brief holds no prices',
      carbon: null,
      cautions: [
        'A screening result is not a design.',
        'Wetted equipment needs a water safety plan against legionella under local codes and standards.',
        'A typical year hides extremes: do not size plant from it.',
      ],
    },
    grade: station.grade,
    gradeColumns: [
      { column: 'distance', grade: 'A', reason: '0 km' },
      { column: 'years', grade: 'C', reason: 'one typical year' },
      { column: 'measured share', grade: 'B', reason: 'flags of the source are not informative' },
    ],
  };
}

const statuses: readonly FileStatus[] = ['review', 'accepted', 'reading', 'asks', 'refused', 'withdrawn', 'superseded'];

export function fixtureFiles(): WeatherFile[] {
  return names.map((name, index): WeatherFile => {
    const status = statuses[index % statuses.length] ?? 'review';
    const isKnown = status !== 'reading' && status !== 'refused';
    return {
      id: fixtureId(200 + index),
      name: `${name.toLowerCase().replaceAll(' ', '-')}-tmy.epw`,
      bytes: 1_534_221 + index * 1_017,
      fingerprint: '9c41e07a55b2fd1837ce90aa412b6c0d7f3a12c9e8d4b6a0915c22fe7731d08b',
      format: status === 'refused' ? null : 'EPW',
      status,
      step: status === 'reading' ? 'reducing' : null,
      failure: null,
      uploadedBy: 'Ines Mabaso',
      uploadedAt: '2026-11-12T12:05:00.000Z',
      batchId: null,
      part: '',
      licence: 'unknown',
      attribution: null,
      station: isKnown
        ? { name, latitude: -26.6, longitude: 20.6, elevationM: 1042, utcOffsetH: 2, wmoNumber: '684240' }
        : null,
      stationId: status === 'accepted' ? fixtureId(100 + index) : null,
      kind: isKnown ? (index % 3 === 2 ? 'actual' : 'typical') : null,
      year: isKnown && index % 3 === 2 ? 2024 : null,
      completePct: isKnown ? 100 - index * 0.37 : null,
      findingCounts: { note: 2, repair: 1, doubt: index === 0 ? 2 : 0, ask: status === 'asks' ? 1 : 0, refuse: 0 },
      parent: null,
    };
  });
}

export function fixtureRecord(file: WeatherFile): WeatherFileRecord {
  const depression = (month: number, hour: number) =>
    Math.max(0.4, 7 + 4 * Math.cos((2 * Math.PI * (month - 8)) / 12) - 6 * Math.cos((2 * Math.PI * (hour - 3)) / 24));
  const rows = [0.4, 1, 2, 5, 10].map((percent, index) => ({
    percent,
    valueC: 36.4 - index * 1.2,
    coincidentC: 17.8 - index * 0.2,
  }));
  return {
    file,
    findings: [
      {
        code: 'step',
        severity: 'doubt',
        line: 2314,
        column: 7,
        lastLine: null,
        count: 1,
        variable: null,
        done: null,
        message: 'Dry bulb falls by 21.4 K from line 2,313 to line 2,314; used as it stands.',
      },
      {
        code: 'stuck',
        severity: 'doubt',
        line: 3661,
        column: null,
        lastLine: null,
        count: 1,
        variable: null,
        done: null,
        message: 'Dew point stays at 4.1 °C for 38 hours from line 3,661 on; used as it stands.',
      },
      {
        code: 'rh-over-100',
        severity: 'repair',
        line: 871,
        column: 9,
        lastLine: null,
        count: 1,
        variable: null,
        done: null,
        message: 'Relative humidity is 101 % in 3 hours from line 871 on; set to saturation.',
      },
      {
        code: 'below-zero-phase',
        severity: 'note',
        line: null,
        column: null,
        lastLine: null,
        count: 1,
        variable: null,
        done: null,
        message: 'Humidity below 0 °C stands for water, found from 214 hours.',
      },
      ...(file.status === 'asks'
        ? [
            {
              code: 'pressure-sea-level',
              severity: 'ask',
              line: 9,
              column: 10,
              lastLine: null,
              count: 1,
              variable: null,
              done: null,
              message: 'Pressure is near 101 kPa at 1,042 m: it seems to be reduced to sea level.',
            } as const,
          ]
        : []),
    ],
    asks:
      file.status === 'asks'
        ? [
            {
              what: 'pressure-sea-level',
              message: 'Is the pressure reduced to sea level?',
              proposal: 'yes, sea-level pressure',
            },
          ]
        : [],
    table: null,
    answers: {},
    comments: null,
    decision: null,
    parts: [],
    acceptedBy: file.status === 'accepted' ? 'Ines Mabaso' : null,
    facts:
      file.status === 'reading' || file.status === 'refused'
        ? null
        : {
            hours: 8760,
            measured: 8700,
            estimated: 29,
            repaired: 15,
            missing: 16,
            assumedPressure: 0,
            belowZero: 'water',
            meanDryBulbC: 19.64,
            meanWetBulbC: 12.31,
            maxDepressionK: 21.7,
            depressionHours: Array.from({ length: 25 }, (_, index) => ({
              atLeastK: index + 1,
              hours: Math.round(8600 * Math.exp(-((index / 11) ** 2))),
            })),
            meanDepressionK: Array.from({ length: 12 }, (_, month) =>
              Array.from({ length: 24 }, (_, hour) => (month === 4 && hour === 3 ? null : depression(month, hour))),
            ),
            monthCompletePct: Array.from({ length: 12 }, (_, month) => (month === 4 ? 97.8 : 100)),
            design: { dryBulb: rows, wetBulb: rows, dewPoint: rows },
          },
    derivation: null,
    children: [],
  };
}
