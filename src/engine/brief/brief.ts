/**
 * A brief: a written cooling requirement, every field in SI. An immutable version of it is what hours are tested against.
 * Field names are those of the presets file; what each means is method.md 3 and 3.1.
 */
export type Stage = 'direct' | 'indirect' | 'dewpoint' | 'twostage' | 'tower';

export type Limit =
  | { readonly kind: 'fixed'; readonly tempC: number }
  | {
      readonly kind: 'adaptive';
      readonly model: 'ashrae55-80' | 'ashrae55-90' | 'en16798-i' | 'en16798-ii' | 'en16798-iii';
      readonly ceilingC: number | null;
    }
  | { readonly kind: 'inlet'; readonly tempC: number; readonly derate?: string }
  | { readonly kind: 'thi'; readonly value: number }
  | { readonly kind: 'shade-heat'; readonly value: number }
  | {
      readonly kind: 'tower';
      readonly coldC: number;
      readonly rangeK: number;
      readonly approachK: number;
      readonly exchangerK: number;
    }
  | { readonly kind: 'turbine'; readonly targetC: number; readonly floorC: number };

export interface HumidityCaps {
  readonly roomRhPct?: number;
  readonly supplyRhPct?: number;
  readonly supplyDewPointC?: number;
}

export interface Tolerance {
  /** Share of demand hours that may be unmet, %. */
  readonly sharePct?: number;
  /** Hours that may be unmet. */
  readonly hours?: number;
  /** Longest spell of unmet hours, h. */
  readonly spellH?: number;
}

export interface HardLimit {
  readonly tempC: number;
  readonly hours: number;
  readonly derate?: string;
}

/** Prices of a site; one that is left out is not known. What depends on the size of plant is per kW of design load. */
export interface Prices {
  /** What the prices are in, such as EUR. */
  readonly currency: string;
  readonly electricityPerKwh?: number;
  readonly waterPerM3?: number;
  /** What the plant costs more than the reference; negative when it costs less. */
  readonly extraCapitalPerKw?: number;
  /** What its upkeep costs more in a year. */
  readonly extraUpkeepPerKwYear?: number;
}

/** Carbon dioxide of the grid, with where the number comes from and of which year. */
export interface GridFactor {
  readonly kgCo2PerKwh: number;
  readonly source: string;
}

export type ScoreComponent = 'served' | 'severity' | 'spell' | 'damp' | 'water' | 'electricity' | 'worst-year';

export interface ScoreAnchor {
  readonly component: ScoreComponent;
  readonly weight: number;
  /** Raw value that scores 0, and the one that scores 100. */
  readonly a0: number;
  readonly a100: number;
}

export interface Brief {
  readonly preset: string;
  readonly source: string;
  readonly phi: 'constant' | 'linear';
  readonly control: 'modulating' | 'on-off';
  readonly primaryAir: 'outdoor' | 'return';
  readonly secondaryAir: 'outdoor' | 'exhaust';
  readonly effDirect: number;
  readonly effIndirect: number;
  readonly effDewPoint: number;
  readonly effExchanger: number;
  readonly cutInDepressionK: number;
  readonly startRoomTempC: number | null;
  readonly maxOutdoorRhPct: number | null;
  readonly freezeLockoutC: number;
  readonly basinHeat: boolean;
  readonly balanceTempC: number | null;
  readonly dwRoomKgKg: number;
  readonly fanWPerLs: Readonly<Record<'air' | 'direct' | 'indirect' | 'dewpoint' | 'twostage' | 'returnAir', number>>;
  readonly pumpKwPerKw: number;
  readonly k: number;
  readonly cycles: number;
  readonly driftPctOfCirculation: number;
  readonly reference: { readonly cop: number; readonly economy: boolean };
  readonly clock: 'civil' | 'standard';
  /** `all`, or month numbers 1..12. */
  readonly months: 'all' | readonly number[];
  readonly weekdays: 'all' | 'mon-fri';
  /** `8-18` (opening and closing), `0-24`, or `daylight`. */
  readonly hours: string;
  readonly caps: HumidityCaps;
  readonly lowerLimits: HumidityCaps;
  readonly hardLimits: readonly HardLimit[];
  readonly reported: readonly string[];
  readonly limit: Limit;
  readonly dTroomK: number;
  readonly dTitK: number | null;
  readonly stages: readonly Stage[];
  readonly towerFanPumpWPerKw: number | null;
  readonly towerLatentShare: number | null;
  readonly tolerance: Tolerance;
  /** Gates that a person answers, such as an infection-control sign-off. */
  readonly gates: readonly string[];
  readonly score: readonly ScoreAnchor[];
  readonly prices?: Prices;
  readonly grid?: GridFactor;
  /** Why stages are on that the use does not have by itself; printed on every sheet. */
  readonly stagesReason?: string;
}
