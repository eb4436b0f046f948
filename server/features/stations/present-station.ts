import type { RuleOff, Station } from '#contract/stations.ts';
import type { RuleOffView, StationView } from './station-read-model.ts';

export function presentStation({ utcOffsetMin, ...view }: StationView): Station {
  return { ...view, utcOffsetH: utcOffsetMin / 60 };
}

export function presentRuleOff({ rule, reason, setBy, setAt }: RuleOffView): RuleOff {
  return { rule, reason, setBy, setAt: setAt.toISOString() };
}
