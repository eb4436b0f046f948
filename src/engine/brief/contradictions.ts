import type { Brief } from './brief.ts';
import type { BriefFault } from './brief-fault.ts';

/** What is wrong between fields that are each in their range. */
export function contradictions(brief: Brief): BriefFault[] {
  return [...stageFaults(brief), ...capFaults(brief), ...limitFaults(brief)];
}

function stageFaults(brief: Brief): BriefFault[] {
  const { stages, limit, primaryAir } = brief;
  const faults: BriefFault[] = [];
  const add = (path: string, message: string): void => {
    faults.push({ path, message });
  };
  if (new Set(stages).size !== stages.length) add('stages', 'each stage stands once');
  if (stages.includes('tower') !== (limit.kind === 'tower')) {
    add('stages', 'a tower goes with a limit of cold water, and no other stage does');
  } else if (limit.kind === 'tower' && stages.length > 1) {
    add('stages', 'cold water comes from the tower alone');
  }
  if ((primaryAir === 'return') !== (limit.kind === 'inlet')) {
    add('primaryAir', 'return air goes with a limit at the inlet of a data hall, outdoor air with every other');
  }
  if (primaryAir === 'return' && stages.some((stage) => stage !== 'indirect')) {
    add('stages', 'return air is cooled by the indirect stage alone');
  }
  if (limit.kind === 'turbine' && stages.some((stage) => stage !== 'direct')) {
    add('stages', 'a turbine inlet is cooled by the direct stage alone');
  }
  return faults;
}

function capFaults({ caps, lowerLimits }: Brief): BriefFault[] {
  const names = ['roomRhPct', 'supplyRhPct', 'supplyDewPointC'] as const;
  return names.flatMap((name) => {
    const cap = caps[name];
    const lower = lowerLimits[name];
    if (cap === undefined || lower === undefined || lower < cap) return [];
    return [
      { path: `lowerLimits.${name}`, message: `the lower limit, ${lower}, leaves no room under the cap, ${cap}` },
    ];
  });
}

function limitFaults(brief: Brief): BriefFault[] {
  const { limit, hardLimits, balanceTempC } = brief;
  if (limit.kind !== 'fixed' && limit.kind !== 'inlet') return [];
  const faults = hardLimits.flatMap((hard, index) =>
    hard.tempC >= limit.tempC
      ? []
      : [
          {
            path: `hardLimits[${index}].tempC`,
            message: `the hard limit, ${hard.tempC} °C, lies under the limit, ${limit.tempC} °C`,
          },
        ],
  );
  if (balanceTempC !== null && balanceTempC > limit.tempC) {
    const message = `demand from ${balanceTempC} °C on only, over the limit of ${limit.tempC} °C itself`;
    faults.push({ path: 'balanceTempC', message });
  }
  return faults;
}
