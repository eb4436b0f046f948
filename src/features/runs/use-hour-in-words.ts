import { useQuery } from '@tanstack/react-query';
import { useCallback, useEffect, useState } from 'react';
import { HOURS_PER_DAY } from '../../engine/conventions.ts';
import { hourSentence } from './hour-words.ts';
import { hourListQuery } from './run-queries.ts';

/** A pointer that crosses the cloth reads nothing; one that stays on a day fetches it. */
const STAY_MS = 140;

/** Says more than its class of the hour that is read on the cloth: its state, why it is what it is, and what it lacks. */
export function useHourInWords(run: { readonly teamId: string; readonly runId: string }) {
  const [day, setDay] = useState<number | null>(null);
  const [stayed, setStayed] = useState<number | null>(null);
  useEffect(() => {
    const timer = setTimeout(() => setStayed(day), STAY_MS);
    return () => clearTimeout(timer);
  }, [day]);
  const found = useQuery({
    ...hourListQuery(run, { choice: { day: stayed ?? 1 }, page: 1, limit: HOURS_PER_DAY }),
    enabled: stayed !== null,
  });
  const list = found.data;
  const more = (slot: number): string | null => {
    const hour = list?.items.find((each) => each.slot === slot);
    return hour === undefined || list === undefined ? null : hourSentence(hour, list);
  };
  const read = useCallback((slot: number | null) => {
    setDay(slot === null ? null : Math.floor(slot / HOURS_PER_DAY) + 1);
  }, []);
  return { read, more };
}
