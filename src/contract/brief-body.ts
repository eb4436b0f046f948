import * as z from 'zod/mini';

/** The engine's Brief as it crosses the wire: the same fields, names and units. What may stand in each the engine alone says. */
const Stage = z.enum(['direct', 'indirect', 'dewpoint', 'twostage', 'tower']);

const Limit = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('fixed'), tempC: z.number() }),
  z.object({
    kind: z.literal('adaptive'),
    model: z.enum(['ashrae55-80', 'ashrae55-90', 'en16798-i', 'en16798-ii', 'en16798-iii']),
    ceilingC: z.nullable(z.number()),
  }),
  z.object({ kind: z.literal('inlet'), tempC: z.number(), derate: z.exactOptional(z.string()) }),
  z.object({ kind: z.literal('thi'), value: z.number() }),
  z.object({ kind: z.literal('shade-heat'), value: z.number() }),
  z.object({
    kind: z.literal('tower'),
    coldC: z.number(),
    rangeK: z.number(),
    approachK: z.number(),
    exchangerK: z.number(),
  }),
  z.object({ kind: z.literal('turbine'), targetC: z.number(), floorC: z.number() }),
]);

const HumidityCaps = z.object({
  roomRhPct: z.exactOptional(z.number()),
  supplyRhPct: z.exactOptional(z.number()),
  supplyDewPointC: z.exactOptional(z.number()),
});

const ScoreAnchor = z.object({
  component: z.enum(['served', 'severity', 'spell', 'damp', 'water', 'electricity', 'worst-year']),
  weight: z.number(),
  a0: z.number(),
  a100: z.number(),
});

export const BriefBody = z.object({
  preset: z.string(),
  source: z.string(),
  phi: z.enum(['constant', 'linear']),
  control: z.enum(['modulating', 'on-off']),
  primaryAir: z.enum(['outdoor', 'return']),
  secondaryAir: z.enum(['outdoor', 'exhaust']),
  effDirect: z.number(),
  effIndirect: z.number(),
  effDewPoint: z.number(),
  effExchanger: z.number(),
  cutInDepressionK: z.number(),
  startRoomTempC: z.nullable(z.number()),
  maxOutdoorRhPct: z.nullable(z.number()),
  freezeLockoutC: z.number(),
  basinHeat: z.boolean(),
  balanceTempC: z.nullable(z.number()),
  dwRoomKgKg: z.number(),
  fanWPerLs: z.object({
    air: z.number(),
    direct: z.number(),
    indirect: z.number(),
    dewpoint: z.number(),
    twostage: z.number(),
    returnAir: z.number(),
  }),
  pumpKwPerKw: z.number(),
  k: z.number(),
  cycles: z.number(),
  driftPctOfCirculation: z.number(),
  reference: z.object({ cop: z.number(), economy: z.boolean() }),
  clock: z.enum(['civil', 'standard']),
  months: z.union([z.literal('all'), z.readonly(z.array(z.int()))]),
  weekdays: z.enum(['all', 'mon-fri']),
  hours: z.string(),
  caps: HumidityCaps,
  lowerLimits: HumidityCaps,
  hardLimits: z.readonly(z.array(z.object({ tempC: z.number(), hours: z.int(), derate: z.exactOptional(z.string()) }))),
  reported: z.readonly(z.array(z.string())),
  limit: Limit,
  dTroomK: z.number(),
  dTitK: z.nullable(z.number()),
  stages: z.readonly(z.array(Stage)),
  towerFanPumpWPerKw: z.nullable(z.number()),
  towerLatentShare: z.nullable(z.number()),
  tolerance: z.object({
    sharePct: z.exactOptional(z.number()),
    hours: z.exactOptional(z.number()),
    spellH: z.exactOptional(z.number()),
  }),
  gates: z.readonly(z.array(z.string())),
  score: z.readonly(z.array(ScoreAnchor)),
  prices: z.exactOptional(
    z.object({
      currency: z.string(),
      electricityPerKwh: z.exactOptional(z.number()),
      waterPerM3: z.exactOptional(z.number()),
      extraCapitalPerKw: z.exactOptional(z.number()),
      extraUpkeepPerKwYear: z.exactOptional(z.number()),
    }),
  ),
  grid: z.exactOptional(z.object({ kgCo2PerKwh: z.number(), source: z.string() })),
  stagesReason: z.exactOptional(z.string()),
});
export type BriefBody = z.infer<typeof BriefBody>;

/**
 * A brief that somebody writes. Anything goes through the wire: the engine reads it whole and answers every fault at once,
 * each at its path (`body.body.effDirect`), with the range and unit that a bare type could not name.
 */
export const BriefDraft = z.record(z.string(), z.unknown());
export type BriefDraft = z.infer<typeof BriefDraft>;

/** The schema of a form that holds a draft; `problemsOf` answers a message for each path that is at fault, dots throughout. */
export function checkedDraft(problemsOf: (draft: BriefDraft) => Readonly<Record<string, string>>) {
  return BriefDraft.check((context) => {
    for (const [path, message] of Object.entries(problemsOf(context.value))) {
      context.issues.push({ code: 'custom', input: context.value, path: path.split('.'), message });
    }
  });
}
