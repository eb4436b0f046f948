import type { TableGuess, WeatherFile, WeatherFileRecord, YearFacts } from '#contract/weather.ts';
import { presentDifference } from './present-derivation.ts';
import type { WeatherFileRecordView, WeatherFileView } from './weather-file-read-model.ts';

export function presentWeatherFile(view: WeatherFileView): WeatherFile {
  const { note = 0, repair = 0, doubt = 0, ask = 0, refuse = 0 } = view.findingCounts;
  return {
    id: view.id,
    name: view.name,
    bytes: view.bytes,
    fingerprint: view.fingerprint,
    format: view.format,
    status: view.status,
    step: view.step,
    failure: view.failure,
    uploadedBy: view.uploadedBy,
    uploadedAt: view.uploadedAt.toISOString(),
    batchId: view.batchId,
    part: view.part,
    licence: view.licence,
    attribution: view.attribution,
    station: view.declaredStation,
    stationId: view.stationId,
    kind: view.kind,
    year: view.year,
    completePct: completePct(view),
    findingCounts: { note, repair, doubt, ask, refuse },
    parent: view.parent,
  };
}

export function presentRecord(record: WeatherFileRecordView): WeatherFileRecord {
  const { findings, asks, table, answers, comments, decision, parts, acceptedBy, facts, derivation, children } = record;
  return {
    file: presentWeatherFile(record),
    findings: findings.map((finding) => ({ ...finding })),
    asks: asks.map((ask) => ({ ...ask })),
    table: table === null ? null : presentTable(table),
    answers: presentAnswers(answers),
    comments,
    decision: decision === null ? null : { ...decision, at: decision.at.toISOString() },
    parts: parts.map((part) => ({ ...part })),
    acceptedBy,
    facts: facts === null ? null : presentFacts(facts),
    derivation: derivation === null ? null : presentDerivation(derivation),
    children: children.map((child) => ({ ...child })),
  };
}

function presentDerivation(
  derivation: NonNullable<WeatherFileRecordView['derivation']>,
): NonNullable<WeatherFileRecord['derivation']> {
  const { humidityRule, monthly, cappedHours, difference } = derivation;
  return {
    humidityRule,
    monthly: monthly.map((change) => ({ ...change })),
    cappedHours,
    difference: presentDifference(difference),
  };
}

function presentTable(table: NonNullable<WeatherFileRecordView['table']>): TableGuess {
  return {
    ...table,
    questions: table.questions.map((question) => ({ ...question })),
    columns: table.columns.map((column) => ({ ...column, cells: [...column.cells] })),
    sample: table.sample.map((row) => ({ ...row })),
  };
}

function presentAnswers({ rulesOff, ...answers }: WeatherFileRecordView['answers']): WeatherFileRecord['answers'] {
  return rulesOff === undefined ? answers : { ...answers, rulesOff: rulesOff.map((off) => ({ ...off })) };
}

export function presentFacts(facts: NonNullable<WeatherFileRecordView['facts']>): YearFacts {
  return {
    hours: facts.hours,
    measured: facts.measured,
    estimated: facts.estimated,
    repaired: facts.repaired,
    missing: facts.missing,
    assumedPressure: facts.assumedPressure,
    belowZero: facts.belowZero,
    meanDryBulbC: facts.meanDryBulbC,
    meanWetBulbC: facts.meanWetBulbC,
    maxDepressionK: facts.maxDepressionK,
    depressionHours: facts.depressionHours.map(({ atLeastK, hours }) => ({ atLeastK, hours })),
    meanDepressionK: facts.meanDepressionK.map((hoursOfDay) => [...hoursOfDay]),
    monthCompletePct: [...facts.monthCompletePct],
    design: {
      dryBulb: facts.design.dryBulb.map((row) => ({ ...row })),
      wetBulb: facts.design.wetBulb.map((row) => ({ ...row })),
      dewPoint: facts.design.dewPoint.map((row) => ({ ...row })),
    },
  };
}

/** Share of slots with dry bulb, humidity and pressure, %; null without a weather year. */
function completePct({ hours, missing }: WeatherFileView): number | null {
  return hours === null || missing === null ? null : (100 * (hours - missing)) / hours;
}
