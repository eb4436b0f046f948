import { type ReactNode, useId } from 'react';
import { useWatch } from 'react-hook-form';
import type { TableGuess } from '../../contract/weather.ts';
import type { AnswerDraft } from './answer-draft.ts';
import { AnswerText, SelectField } from './answer-fields.tsx';
import { type MappingDraft, type MappingField, timeFields } from './mapping-draft.ts';

/** What the columns of a table hold, the guess filled in, the questions beside the fields that answer them. */
export function TableMapping({ table }: { table: TableGuess }) {
  const form = useWatch<AnswerDraft, 'mapping.form'>({ name: 'mapping.form' });
  const scale = useWatch<AnswerDraft, 'mapping.scale'>({ name: 'mapping.scale' });
  const asked = (about: string) => table.questions.find((question) => question.about === about)?.message;
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-lead font-semibold">What the columns hold</legend>
      <p className="max-w-[80ch]">
        {asked('columns')} {asked('units')}
      </p>
      <div className="mt-2">
        {quantities.map((quantity) => (
          <QuantityRow key={quantity.field} table={table} quantity={quantity} />
        ))}
        <Row>
          <ColumnField table={table} field="station" label="Station" hint={asked('station')} isOptional />
        </Row>
      </div>
      <h3 className="mt-4 mb-1 text-body text-ink">Times</h3>
      <div className="grid items-start gap-x-4 gap-y-3 sm:grid-cols-2 lg:grid-cols-3">
        <SelectField field="mapping.form" label="How times are written">
          <option value="stamp">Date and time in one column</option>
          <option value="date and time">A column of dates, a column of times</option>
          <option value="parts">Month, day and hour in columns</option>
          <option value="serial days">Days of a spreadsheet</option>
          <option value="epoch">Seconds since 1970</option>
        </SelectField>
        {timeFields(form).map((field) => (
          <ColumnField
            key={field}
            table={table}
            field={field}
            label={timeLabels[field] ?? 'Column'}
            isOptional={field === 'year' || field === 'minute'}
          />
        ))}
        <FormDetails form={form} orderQuestion={asked('date order')} />
        <SelectField field="mapping.scale" label="Time scale" hint={asked('time scale')}>
          <option value="standard">Local standard time</option>
          <option value="UTC">UTC</option>
          <option value="clock">Local clock time, with daylight saving</option>
          <option value="in stamps">Each time carries its offset</option>
        </SelectField>
        {scale === 'clock' ? <ZoneField /> : null}
        <SelectField field="mapping.mark" label="What 14:00 means" hint={asked('time mark')}>
          <option value="reading">The reading at 14:00</option>
          <option value="ending">The hour that ends at 14:00</option>
          <option value="beginning">The hour that begins at 14:00</option>
        </SelectField>
        <SelectField field="mapping.years" label="Years" hint={asked('years')}>
          <option value="actual">Real years, each a weather year</option>
          <option value="typical">A typical year made of months</option>
        </SelectField>
      </div>
    </fieldset>
  );
}

interface Quantity {
  readonly field: MappingField;
  readonly label: string;
  readonly unit: MappingField;
  /** Values of the mapping, and their words. */
  readonly units: readonly (readonly [string, string])[];
  readonly isOptional: boolean;
}

const temperatureUnits = [
  ['C', '°C'],
  ['F', '°F'],
  ['K', 'K'],
] as const;

const quantities: readonly Quantity[] = [
  { field: 'dryBulb', label: 'Dry bulb', unit: 'dryBulbUnit', units: temperatureUnits, isOptional: false },
  { field: 'dewPoint', label: 'Dew point', unit: 'dewPointUnit', units: temperatureUnits, isOptional: true },
  {
    field: 'relativeHumidity',
    label: 'Relative humidity',
    unit: 'relativeHumidityUnit',
    units: [
      ['%', '%'],
      ['fraction', 'Fraction, 0 to 1'],
    ],
    isOptional: true,
  },
  { field: 'wetBulb', label: 'Wet bulb', unit: 'wetBulbUnit', units: temperatureUnits, isOptional: true },
  {
    field: 'pressure',
    label: 'Pressure',
    unit: 'pressureUnit',
    units: ['Pa', 'hPa', 'kPa', 'inHg', 'mmHg'].map((unit) => [unit, unit] as const),
    isOptional: true,
  },
];

function QuantityRow({ table, quantity }: { table: TableGuess; quantity: Quantity }) {
  const { field, label, unit, units, isOptional } = quantity;
  const column = useWatch<AnswerDraft, `mapping.${MappingField}`>({ name: `mapping.${field}` });
  return (
    <Row>
      <ColumnField table={table} field={field} label={label} isOptional={isOptional} />
      {column === '' ? null : (
        <SelectField field={`mapping.${unit}`} label={`Unit of ${label.toLowerCase()}`}>
          {units.map(([value, words]) => (
            <option key={value} value={value}>
              {words}
            </option>
          ))}
        </SelectField>
      )}
      {field === 'pressure' && column !== '' ? (
        <SelectField field="mapping.pressureLevel" label="Level of pressure">
          <option value="station">At the station</option>
          <option value="sea level">At sea level</option>
          <option value="altimeter">Altimeter setting</option>
        </SelectField>
      ) : null}
    </Row>
  );
}

function Row({ children }: { children: ReactNode }) {
  return (
    <div className="grid items-start gap-x-4 gap-y-2 border-t border-line py-2 sm:grid-cols-[minmax(0,2fr)_minmax(0,1fr)_minmax(0,1fr)]">
      {children}
    </div>
  );
}

interface ColumnFieldProps {
  readonly table: TableGuess;
  readonly field: MappingField;
  readonly label: string;
  readonly hint?: string | undefined;
  readonly isOptional: boolean;
}

/** The choice of a column, with the first values of the one that is chosen. */
function ColumnField({ table, field, label, hint, isOptional }: ColumnFieldProps) {
  const chosen = useWatch<AnswerDraft, `mapping.${MappingField}`>({ name: `mapping.${field}` });
  const column = table.columns.find(({ name }) => name === chosen);
  const cells = column ? column.cells.filter((cell) => cell !== '').join('; ') : '';
  const unit = column?.unit ? `, written as ${column.unit}` : '';
  const values = column ? `Begins ${cells === '' ? 'empty' : cells}${unit}` : undefined;
  return (
    <SelectField field={`mapping.${field}`} label={label} hint={[hint, values].filter(Boolean).join(' ')}>
      <option value="">{isOptional ? 'None' : 'Choose a column'}</option>
      {table.columns.map(({ name }) => (
        <option key={name} value={name}>
          {name}
        </option>
      ))}
    </SelectField>
  );
}

const timeLabels: Partial<Record<MappingField, string>> = {
  stamp: 'Column of times',
  date: 'Column of dates',
  time: 'Column of times',
  year: 'Year',
  month: 'Month',
  day: 'Day',
  hour: 'Hour',
  minute: 'Minute',
};

function FormDetails({ form, orderQuestion }: { form: MappingDraft['form']; orderQuestion: string | undefined }) {
  switch (form) {
    case 'stamp':
    case 'date and time':
      return (
        <SelectField field="mapping.order" label="Order of the date" hint={orderQuestion}>
          <option value="year first">Year, month, day</option>
          <option value="day first">Day, month, year</option>
          <option value="month first">Month, day, year</option>
        </SelectField>
      );
    case 'parts':
      return (
        <SelectField field="mapping.hours" label="How hours are written">
          <option value="hours">14</option>
          <option value="hours and minutes">1400</option>
        </SelectField>
      );
    case 'serial days':
      return (
        <SelectField field="mapping.system" label="Days counted from">
          <option value="1900">1900</option>
          <option value="1904">1904</option>
        </SelectField>
      );
    case 'epoch':
      return (
        <SelectField field="mapping.epochUnit" label="Counted in">
          <option value="s">Seconds</option>
          <option value="ms">Milliseconds</option>
        </SelectField>
      );
  }
}

function ZoneField() {
  const id = useId();
  return (
    <>
      <AnswerText field="mapping.zone" label="Time zone" hint="Such as Europe/Rome" list={id} />
      <datalist id={id}>
        {Intl.supportedValuesOf('timeZone').map((zone) => (
          <option key={zone} value={zone} />
        ))}
      </datalist>
    </>
  );
}
