import { useId } from 'react';
import { HOURS_PER_DAY } from '../../engine/conventions.ts';
import { Button } from '../../ui/button.tsx';
import { slotWords } from './record-hour-words.ts';

interface HourChoiceProps {
  readonly slot: number;
  readonly slots: number;
  readonly onChoose: (slot: number) => void;
}

/** Any hour of the year: the slider and its arrow keys go by the hour, the buttons by the day. */
export function HourChoice({ slot, slots, onChoose }: HourChoiceProps) {
  const id = useId();
  const held = (wanted: number) => Math.min(slots - 1, Math.max(0, wanted));
  return (
    <div className="min-w-64 flex-1">
      <label htmlFor={id} className="mb-1 block text-fine font-semibold text-soft">
        Hour: <span className="font-normal text-ink">{slotWords(slot, slots)}</span>
      </label>
      <div className="flex items-center gap-2">
        <Button look="quiet" onClick={() => onChoose(held(slot - HOURS_PER_DAY))}>
          Day before
        </Button>
        <input
          id={id}
          type="range"
          min={1}
          max={slots}
          value={slot + 1}
          aria-valuetext={slotWords(slot, slots)}
          onChange={(event) => onChoose(held(Number(event.currentTarget.value) - 1))}
          className="min-w-24 flex-1 accent-indigo"
        />
        <Button look="quiet" onClick={() => onChoose(held(slot + HOURS_PER_DAY))}>
          Day after
        </Button>
      </div>
    </div>
  );
}
