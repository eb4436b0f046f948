import type { ScoreComponent } from '../brief/brief.ts';
import type { ResolvedClock } from '../clock/resolved-clock.ts';
import type { HourClass } from '../hour-classes/hour-class.ts';
import type { MoneyAnswer } from '../money/yearly-money.ts';

/** Count of hours per class; the counts add up to `hours`, which is asserted on every run. */
export interface Ledger {
  readonly hours: number;
  readonly classes: Readonly<Record<HourClass, number>>;
  /** `damp` by its two reasons: outdoor moisture itself, and cold enough only by too much moisture. */
  readonly dampOutside: number;
  readonly dampPlant: number;
  /** All but closed, missing and idle. */
  readonly demand: number;
  readonly met: number;
}

/** Counts as if no scheduled hour were missing, scaled by month x hour of day (method 2). */
export interface ScaledCounts {
  readonly demand: number;
  readonly met: number;
  /** Scheduled hours of which no hour of the same month and hour of day is known: in no scaled count. */
  readonly unknown: number;
}

/** The longest run of unmet demand hours (method.md 5). */
export interface WorstSpell {
  readonly hours: number;
  readonly startSlot: number;
  readonly endSlot: number;
  readonly severityKh: number;
  readonly worstK: number;
  readonly cutAtJoint: boolean;
}

export interface ScorePart {
  readonly component: ScoreComponent;
  readonly label: string;
  readonly unit: string;
  /** null: not applicable; its weight is shared over the others. */
  readonly raw: number | null;
  readonly a0: number;
  readonly a100: number;
  readonly normalised: number | null;
  /** Weight after sharing, of 100. */
  readonly weight: number;
  readonly points: number | null;
}

export type Verdict = 'meets the brief' | 'does not' | 'no tolerance set';

export interface ToleranceAnswer {
  readonly tolerance: string;
  readonly found: number;
  readonly allowed: number;
  readonly unit: string;
  readonly holds: boolean;
}

export interface GateAnswer {
  readonly gate: string;
  readonly answer: 'pass' | 'fail' | 'not known';
  readonly note: string;
}

/** Demand hours whose supply, °C, lies in [fromC, fromC + 1). */
export interface SupplyBin {
  readonly fromC: number;
  readonly hours: number;
}

/** Electricity of the year, kWh, and its greatest hour, kW, both ways, back-up counted. */
export interface Electricity {
  readonly kwh: number;
  readonly referenceKwh: number;
  readonly savedPct: number | null;
  readonly peakKw: number;
  readonly referencePeakKw: number;
  /** Heat that the back-up must be able to take, kW of cooling. */
  readonly backUpKw: number;
}

/** Hours in which water is recirculated: an input to the water safety plan, no verdict (method 6). */
export interface RecirculatedHours {
  readonly all: number;
  /** Of them those with water at 20 °C or more. */
  readonly warm: number;
}

/** Demand hours of something that a brief asks to have reported and that makes no class; null: not counted by this program. */
export interface ReportedHours {
  readonly what: string;
  readonly hours: number | null;
}

/** One weather year judged by one brief version. Water, electricity and money are per kW of design load. */
export interface RunResult extends MoneyAnswer {
  readonly methodVersion: string;
  readonly clock: ResolvedClock;
  /** Every month in which the brief has schedule has 90 % of its hours (method 2). */
  readonly usable: boolean;
  /** Months in schedule, 1..12, with fewer. */
  readonly monthsShort: readonly number[];
  readonly ledger: Ledger;
  readonly scaled: ScaledCounts;
  /** Demand hours whose adaptive limit was clamped to its range; null for other limits. */
  readonly clampedLimitHours: number | null;
  /** K h; of an index limit, index-point hours. */
  readonly severityKh: number;
  readonly worstSpell: WorstSpell | null;
  /** Demand hours that each permitted stage (and outdoor air) would meet alone; not exclusive, never stacked. */
  readonly aloneHours: Readonly<Partial<Record<HourClass, number>>>;
  /** Supply temperatures (of a tower, of the water) in demand hours, ascending bins of 1 K without a gap. */
  readonly supplyCurve: readonly SupplyBin[];
  /** Demand and met hours by month (12) x hour of day (24), in the slots' standard time. */
  readonly demandByMonthHour: readonly (readonly number[])[];
  readonly metByMonthHour: readonly (readonly number[])[];
  readonly water: {
    readonly makeUpLitres: number;
    readonly evaporatedLitres: number;
    readonly litresPerKwh: number | null;
    readonly worstMonthLitres: number;
    readonly worstMonth: number | null;
    readonly peakDayLitres: number;
    /** Day of the year, 0 first. */
    readonly peakDay: number | null;
    readonly peakHourLitres: number;
    readonly coolingKwh: number;
  };
  /** null: not applicable, as for turbine inlets. */
  readonly electricity: Electricity | null;
  /** Degree hours gained at a turbine inlet, K h; null for every other use. */
  readonly degreeHours: number | null;
  readonly recirculatedHours: RecirculatedHours;
  readonly reported: readonly ReportedHours[];
  readonly gates: readonly GateAnswer[];
  readonly tolerances: readonly ToleranceAnswer[];
  readonly verdict: Verdict;
  /** Names of the tolerances and hard limits that fail. */
  readonly failed: readonly string[];
  /** The printed integer; null when not applicable (no demand) or excluded by a gate. */
  readonly score: number | null;
  /** Why `score` is null: "excluded: ..." or "not applicable: no demand". */
  readonly scoreNote: string | null;
  /** The weighted sum before gates; never shown where `score` is null. */
  readonly scoreExact: number | null;
  readonly geometricMean: number | null;
  /** "most", "much", "some" or "little". */
  readonly words: string | null;
  readonly parts: readonly ScorePart[];
  /** One position in `hourClasses` for every slot. */
  readonly hourClassCodes: Uint8Array;
}
