const EVERY_MS = 2_000;

/** Says how far a long work is, not oftener than anybody can read. */
export function makeProgress(say: (words: string) => void): (words: string) => void {
  let next = 0;
  return (words) => {
    const now = Date.now();
    if (now < next) return;
    next = now + EVERY_MS;
    say(words);
  };
}

/** 12 345 678 bytes as "12.3 MB", in thousands. */
export function sizeWords(bytes: number): string {
  const units = ['bytes', 'kB', 'MB', 'GB', 'TB'];
  const step = Math.min(units.length - 1, Math.floor(Math.log10(Math.max(1, bytes)) / 3));
  return `${step === 0 ? bytes : (bytes / 1000 ** step).toFixed(1)} ${units[step]}`;
}
