import type { Brief } from './brief.ts';
import type { BriefFault } from './brief-fault.ts';

/** What is wrong between fields that are each in their range. */
export function contradictions(brief: Brief): BriefFault[] {
  return [
    ...stageFaults(brief),
    ...capFaults(brief),
    ...limitFaults(brief),
    ...startFaults(brief),
    ...faultsOfUse(brief),
  ];
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
  const wetsClinicAir = stages.includes('direct') || stages.includes('twostage');
  if (brief.preset === 'clinic' && wetsClinicAir && brief.stagesReason === undefined) {
    add('stages', 'in a clinic direct and two-stage cooling need a written reason, in stagesReason');
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

function startFaults({ limit, startRoomTempC }: Brief): BriefFault[] {
  if (limit.kind !== 'fixed' || startRoomTempC === null || startRoomTempC <= limit.tempC) return [];
  const message = `water starts at ${startRoomTempC} °C in the room only, over the limit of ${limit.tempC} °C itself`;
  return [{ path: 'startRoomTempC', message }];
}

/** Fields that a use does not have, or cannot do with. */
function faultsOfUse(brief: Brief): BriefFault[] {
  const { limit } = brief;
  const indexed = limit.kind === 'thi' || limit.kind === 'shade-heat';
  const room = indexed || limit.kind === 'fixed' || limit.kind === 'adaptive';
  const rules: readonly (readonly [holds: boolean, path: string, message: string])[] = [
    [room || brief.dTroomK === 0, 'dTroomK', 'there is no room to warm up here; leave the rise at 0'],
    [limit.kind !== 'inlet' || brief.dwRoomKgKg === 0, 'dwRoomKgKg', 'the equipment of a hall gives off no moisture'],
    [room || brief.phi === 'constant', 'phi', 'the load of halls, towers and turbines is constant'],
    [
      brief.phi === 'constant' || !room || brief.balanceTempC !== null,
      'balanceTempC',
      'a load that grows from the balance temperature on needs one',
    ],
    [
      brief.secondaryAir === 'outdoor' || (room && !indexed),
      'secondaryAir',
      indexed
        ? 'room exhaust needs a temperature that the room is held at, which an index does not set'
        : 'room exhaust needs a room that outdoor air serves',
    ],
    [!brief.basinHeat || limit.kind === 'tower', 'basinHeat', 'a heated basin goes with a cooling tower'],
    [
      !indexed || brief.hardLimits.length === 0,
      'hardLimits',
      'a hard limit is a temperature, and an index holds the room at none',
    ],
  ];
  return rules.flatMap(([holds, path, message]) => (holds ? [] : [{ path, message }]));
}
