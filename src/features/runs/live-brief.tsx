import {
  Group,
  Input,
  Label,
  NumberField,
  Slider,
  SliderOutput,
  SliderThumb,
  SliderTrack,
} from 'react-aria-components';
import { parseHours } from '../../engine/brief/schedule-hours.ts';
import {
  changed,
  type LiveDraft,
  type LiveHours,
  type LiveNumber,
  type LiveParameter,
  savedValue,
  shownValue,
} from './live-parameters.ts';

interface LiveBriefProps {
  readonly parameters: readonly LiveParameter[];
  readonly draft: LiveDraft;
  /** What the engine says against a value, by path. */
  readonly problems: Readonly<Record<string, string>>;
  /** `isDone`: the thumb was let go, or a value was typed. */
  readonly onChange: (draft: LiveDraft, isDone: boolean) => void;
}

/** The main parameters of the brief: each can be dragged or typed, and the map follows. */
export function LiveBrief({ parameters, draft, problems, onChange }: LiveBriefProps) {
  return (
    <div className="grid gap-1.5">
      {parameters.map((parameter) => {
        const value = draft[parameter.path] ?? parameter.saved;
        const change = (next: number | string, isDone: boolean) => onChange(changed(draft, parameter, next), isDone);
        const problem = problems[parameter.path];
        return parameter.kind === 'hours' ? (
          <HoursSlider key={parameter.path} parameter={parameter} value={String(value)} onChange={change} />
        ) : (
          <NumberSlider
            key={parameter.path}
            parameter={parameter}
            value={Number(value)}
            problem={problem}
            onChange={change}
          />
        );
      })}
    </div>
  );
}

const TRACK = 'relative h-4 w-full cursor-pointer pointer-coarse:h-7';
const LINE = 'absolute top-1/2 h-[3px] -translate-y-1/2 rounded-full';
const THUMB =
  'top-1/2 size-4 rounded-full border-2 border-ink bg-paper data-dragging:bg-ink data-focus-visible:outline-2 data-focus-visible:outline-offset-2 data-focus-visible:outline-indigo pointer-coarse:size-6';
const TYPED =
  'h-6 w-12 rounded-md border border-transparent bg-transparent px-1 text-right font-semibold hover:border-[#b9af9b] focus:border-[#918a78] focus:bg-paper pointer-coarse:h-9 pointer-coarse:border-[#b9af9b]';

interface NumberSliderProps {
  readonly parameter: LiveNumber;
  readonly value: number;
  readonly problem: string | undefined;
  readonly onChange: (value: number, isDone: boolean) => void;
}

function NumberSlider({ parameter, value, problem, onChange }: NumberSliderProps) {
  const { label, unit, scale, min, max, step, saved } = parameter;
  const shown = shownValue(value, scale);
  const before = shownValue(saved, scale);
  const tell = (next: number, isDone: boolean) => onChange(savedValue(next, scale), isDone);
  const share = (each: number) => `${(100 * (Math.min(max, Math.max(min, each)) - min)) / (max - min)}%`;
  return (
    <div>
      <div className="flex items-baseline justify-between gap-2">
        <span className="min-w-0 text-fine leading-tight">{label}</span>
        <NumberField
          aria-label={unit === '' ? label : `${label}, ${unit}`}
          value={shown}
          isInvalid={problem !== undefined}
          formatOptions={{ maximumFractionDigits: 2, useGrouping: false }}
          onChange={(next) => {
            if (!Number.isNaN(next) && next !== shown) tell(next, true);
          }}
        >
          <Group className="flex items-baseline gap-1 whitespace-nowrap">
            <Input className={`${TYPED} ${value === saved ? '' : 'text-indigo'}`} />
            <span className="text-fine text-soft">{unit}</span>
          </Group>
        </NumberField>
      </div>
      <Slider
        aria-label={label}
        minValue={min}
        maxValue={max}
        step={step}
        value={Math.min(max, Math.max(min, shown))}
        onChange={(next) => tell(next, false)}
        onChangeEnd={(next) => tell(next, true)}
        formatOptions={{ maximumFractionDigits: 2 }}
      >
        <SliderTrack className={TRACK}>
          <span className={`${LINE} inset-x-0 bg-[#cfc6b2]`} />
          <span className={`${LINE} left-0 bg-ink`} style={{ width: share(shown) }} />
          {value === saved ? null : (
            <span
              aria-hidden="true"
              className="absolute top-0 h-full w-px bg-madder"
              style={{ left: share(before) }}
              title={`Saved: ${before} ${unit}`}
            />
          )}
          <SliderThumb className={THUMB} />
        </SliderTrack>
      </Slider>
      {problem === undefined ? null : (
        <p role="alert" className="text-fine text-madder">
          {problem}
        </p>
      )}
    </div>
  );
}

interface HoursSliderProps {
  readonly parameter: LiveHours;
  readonly value: string;
  readonly onChange: (value: string, isDone: boolean) => void;
}

/** Opening and closing as two thumbs of one slider, and as two typed hours. */
function HoursSlider({ parameter, value, onChange }: HoursSliderProps) {
  const parsed = parseHours(value);
  const { opening, closing } = parsed === null || parsed === 'daylight' ? { opening: 0, closing: 24 } : parsed;
  const tell = ([from = 0, to = 24]: readonly number[], isDone: boolean) => {
    if (from < to) onChange(`${from}-${to}`, isDone);
  };
  const isSaved = value === parameter.saved;
  return (
    <div>
      <div className="flex items-baseline justify-between gap-2">
        <span className="text-fine">{parameter.label}</span>
        <span className="flex items-baseline gap-1 text-fine text-soft">
          <HourField
            label="Opening"
            value={opening}
            most={closing - 1}
            isSaved={isSaved}
            onChange={(next) => tell([next, closing], true)}
          />
          to
          <HourField
            label="Closing"
            value={closing}
            least={opening + 1}
            isSaved={isSaved}
            onChange={(next) => tell([opening, next], true)}
          />
          h
        </span>
      </div>
      <Slider
        aria-label={parameter.label}
        minValue={0}
        maxValue={24}
        value={[opening, closing]}
        onChange={(next) => tell(next, false)}
        onChangeEnd={(next) => tell(next, true)}
      >
        <SliderOutput className="sr-only">{`${opening} to ${closing} h`}</SliderOutput>
        <SliderTrack className={TRACK}>
          <span className={`${LINE} inset-x-0 bg-[#cfc6b2]`} />
          <span
            className={`${LINE} bg-ink`}
            style={{ left: `${(100 * opening) / 24}%`, width: `${(100 * (closing - opening)) / 24}%` }}
          />
          <SliderThumb index={0} aria-label="Opening" className={THUMB} />
          <SliderThumb index={1} aria-label="Closing" className={THUMB} />
        </SliderTrack>
      </Slider>
    </div>
  );
}

interface HourFieldProps {
  readonly label: string;
  readonly value: number;
  readonly least?: number;
  readonly most?: number;
  readonly isSaved: boolean;
  readonly onChange: (hour: number) => void;
}

function HourField({ label, value, least = 0, most = 24, isSaved, onChange }: HourFieldProps) {
  return (
    <NumberField
      value={value}
      minValue={least}
      maxValue={most}
      onChange={(next) => {
        if (!Number.isNaN(next) && next !== value) onChange(next);
      }}
    >
      <Label className="sr-only">{label}, hour of the day</Label>
      <Input className={`${TYPED} w-9 text-body text-ink ${isSaved ? '' : 'text-indigo'}`} />
    </NumberField>
  );
}
