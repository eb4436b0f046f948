import {
  Input,
  NumberField,
  Slider,
  SliderThumb,
  SliderTrack,
  ToggleButton,
  ToggleButtonGroup,
} from 'react-aria-components';
import { monthNames } from '../../charts/calendar.ts';
import { classWords } from '../../charts/hour-class-words.ts';
import { hourClasses } from '../../engine/hour-classes/hour-class.ts';
import {
  ALL_MONTHS,
  type LayerKind,
  layerKinds,
  layerNames,
  type MapLayer,
  MOST_DEPRESSION_K,
  usualLayer,
} from './map-layer.ts';

interface LayerChoiceProps {
  readonly layer: MapLayer;
  readonly onChoose: (layer: MapLayer) => void;
}

const SELECT =
  'min-h-8 w-full min-w-0 rounded-md border border-[#b9af9b] bg-paper px-1.5 pointer-coarse:min-h-10 text-body';

/** What the marks are coloured by, with the options of the layer under it. */
export function LayerChoice({ layer, onChoose }: LayerChoiceProps) {
  return (
    <div className="grid gap-1.5">
      <select
        aria-label="Layer of the map"
        value={layer.kind}
        onChange={({ currentTarget }) => {
          const kind = layerKinds.find((each: LayerKind) => each === currentTarget.value);
          if (kind !== undefined) onChoose(usualLayer(kind));
        }}
        className={`${SELECT} serif text-lead`}
      >
        {layerKinds.map((kind) => (
          <option key={kind} value={kind}>
            {layerNames[kind]}
          </option>
        ))}
      </select>
      {layer.kind === 'hours' ? (
        <select
          aria-label="Hour class"
          value={layer.hourClass}
          onChange={({ currentTarget }) => {
            const hourClass = hourClasses.find((each) => each === currentTarget.value);
            if (hourClass !== undefined) onChoose({ kind: 'hours', hourClass });
          }}
          className={SELECT}
        >
          {hourClasses.map((hourClass) => (
            <option key={hourClass} value={hourClass}>
              {classWords[hourClass]}
            </option>
          ))}
        </select>
      ) : null}
      {layer.kind === 'depression' ? <DepressionOptions layer={layer} onChoose={onChoose} /> : null}
    </div>
  );
}

interface DepressionOptionsProps {
  readonly layer: Extract<MapLayer, { kind: 'depression' }>;
  readonly onChoose: (layer: MapLayer) => void;
}

/** The slider reaches what climates have; what is typed may go as far as the counts do. */
const SLIDER_MOST_K = 30;

function DepressionOptions({ layer, onChoose }: DepressionOptionsProps) {
  const { atLeastK, months } = layer;
  const put = (next: number) => {
    if (!Number.isNaN(next) && next !== atLeastK) onChoose({ ...layer, atLeastK: Math.round(next) });
  };
  return (
    <div className="grid gap-1">
      <NumberField
        aria-label="At least, K"
        value={atLeastK}
        minValue={0}
        maxValue={MOST_DEPRESSION_K}
        step={1}
        onChange={put}
        className="flex items-baseline justify-between text-fine"
      >
        <span>At least</span>
        <span className="flex items-baseline gap-1">
          <Input className="h-7 w-10 rounded-md border border-[#b9af9b] bg-paper px-1 text-right font-semibold" />K
        </span>
      </NumberField>
      <Slider
        aria-label="Least depression, K"
        minValue={0}
        maxValue={SLIDER_MOST_K}
        value={Math.min(SLIDER_MOST_K, atLeastK)}
        onChange={put}
      >
        <SliderTrack className="relative h-5 w-full cursor-pointer">
          <span className="absolute inset-x-0 top-1/2 h-[3px] -translate-y-1/2 rounded-full bg-[#cfc6b2]" />
          <SliderThumb className="top-1/2 size-4 rounded-full border-2 border-ink bg-paper data-focus-visible:outline-2 data-focus-visible:outline-offset-2 data-focus-visible:outline-indigo pointer-coarse:size-6" />
        </SliderTrack>
      </Slider>
      <ToggleButtonGroup
        aria-label="Months"
        selectionMode="multiple"
        disallowEmptySelection
        selectedKeys={months.map(String)}
        onSelectionChange={(keys) => {
          const chosen = new Set([...keys].map(Number));
          onChoose({ ...layer, months: ALL_MONTHS.filter((month) => chosen.has(month)) });
        }}
        className="grid grid-cols-12 border border-[#b9af9b] max-sm:grid-cols-6"
      >
        {monthNames.map((name, index) => (
          <ToggleButton
            key={name}
            id={String(index + 1)}
            aria-label={name}
            className="min-h-6 border-line text-[0.6875rem] text-soft not-first:border-l data-focus-visible:outline-2 data-focus-visible:-outline-offset-1 data-selected:bg-[#d9d1be] data-selected:font-semibold data-selected:text-ink pointer-coarse:min-h-9"
          >
            {name.charAt(0)}
          </ToggleButton>
        ))}
      </ToggleButtonGroup>
    </div>
  );
}
