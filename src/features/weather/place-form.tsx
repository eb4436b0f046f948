import type { Ask } from '../../contract/weather.ts';
import { AnswerText } from './answer-fields.tsx';

/** Where the station stands, with what the file asks about it. What stays as the file has it is not changed. */
export function PlaceForm({ asks }: { asks: readonly Ask[] }) {
  return (
    <fieldset className="min-w-0">
      <legend className="mb-1 text-lead font-semibold">Where the station is</legend>
      {asks.map(({ what, message, proposal }) => (
        <p key={`${what} ${message}`} className="mb-1 max-w-[80ch]">
          {message}
          {proposal ? <span className="text-soft"> The file suggests: {proposal}</span> : null}
        </p>
      ))}
      <div className="mt-2 grid items-start gap-x-4 gap-y-3 sm:grid-cols-2 lg:grid-cols-[minmax(0,2fr)_repeat(4,minmax(0,1fr))]">
        <AnswerText field="place.name" label="Name" className="sm:max-lg:col-span-2" />
        <AnswerText field="place.latitude" label="Latitude, °" hint="South negative" inputMode="text" />
        <AnswerText field="place.longitude" label="Longitude, °" hint="West negative" inputMode="text" />
        <AnswerText field="place.elevationM" label="Elevation, m" hint="Above the sea" inputMode="text" />
        <AnswerText
          field="place.utcOffsetH"
          label="UTC offset, h"
          hint="Of standard time; left empty, that of the place is taken"
          inputMode="text"
        />
      </div>
    </fieldset>
  );
}
