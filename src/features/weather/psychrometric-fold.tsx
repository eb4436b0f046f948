import { lazy, Suspense, useEffect, useRef, useState } from 'react';
import type { WeatherFileRecord, YearFacts } from '../../contract/weather.ts';
import { Loading } from '../../ui/loading.tsx';

const PsychrometricYear = lazy(async () => ({
  default: (await import('./psychrometric-year.tsx')).PsychrometricYear,
}));

export interface PsychrometricFoldProps {
  readonly record: WeatherFileRecord;
  readonly facts: YearFacts;
  readonly slot: number | null;
  readonly onChoose: (slot: number) => void;
}

/** The psychrometric chart behind a fold: it opens by its heading, and by choosing an hour on the year cloth. */
export function PsychrometricFold(props: PsychrometricFoldProps) {
  const { slot } = props;
  const fold = useRef<HTMLDetailsElement>(null);
  const [isOpen, setIsOpen] = useState(false);
  const [chosen, setChosen] = useState(slot);
  if (slot !== chosen) {
    setChosen(slot);
    if (slot !== null) setIsOpen(true);
  }
  const wasOpen = useRef(false);
  useEffect(() => {
    if (isOpen && !wasOpen.current && slot !== null) fold.current?.scrollIntoView({ block: 'nearest' });
    wasOpen.current = isOpen;
  }, [isOpen, slot]);
  return (
    <details
      ref={fold}
      open={isOpen}
      onToggle={(event) => setIsOpen(event.currentTarget.open)}
      className="border-y border-line py-3 print:not-open:hidden"
    >
      <summary className="cursor-pointer">
        <h2 className="inline text-name">The year on the psychrometric chart</h2>
        <span className="ml-3 text-soft">what the stages of a brief do in any hour of it</span>
      </summary>
      {isOpen ? (
        <Suspense fallback={<Loading what="the chart" />}>
          <PsychrometricYear {...props} />
        </Suspense>
      ) : null}
    </details>
  );
}
