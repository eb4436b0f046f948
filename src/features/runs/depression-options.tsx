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
import { ALL_MONTHS, type MapLayer, MOST_DEPRESSION_K } from './map-layer.ts';

interface DepressionOptionsProps {
  readonly layer: Extract<MapLayer, { kind: 'depression' }>;
  readonly onChoose: (layer: MapLayer) => void;
}

/** The slider reaches what climates have; what is typed may go as far as the counts do. */
const SLIDER_MOST_K = 30;

/** The least depression, whole K, and the months that are counted. */
export function DepressionOptions({ layer, onChoose }: DepressionOptionsProps) {
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
