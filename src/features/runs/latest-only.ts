/**
 * Asks one thing at a time and always the latest: what is wished in between is left out. An answer that comes after `leave` is
 * dropped.
 */
export function latestOnly<Wish, Answer>(on: {
  readonly ask: (wish: Wish, signal: AbortSignal) => Promise<Answer>;
  readonly onAnswer: (answer: Answer, wish: Wish) => void;
  readonly onFault: (error: unknown) => void;
}) {
  let next: { readonly wish: Wish } | null = null;
  let flight: AbortController | null = null;

  const send = async (): Promise<void> => {
    if (flight !== null || next === null) return;
    const { wish } = next;
    const mine = new AbortController();
    next = null;
    flight = mine;
    try {
      const answer = await on.ask(wish, mine.signal);
      if (flight === mine) on.onAnswer(answer, wish);
    } catch (error) {
      if (flight === mine) on.onFault(error);
    }
    if (flight !== mine) return;
    flight = null;
    void send();
  };

  return {
    want(wish: Wish): void {
      next = { wish };
      void send();
    },
    leave(): void {
      flight?.abort();
      flight = null;
      next = null;
    },
  };
}
