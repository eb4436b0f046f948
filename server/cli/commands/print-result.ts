/** One JSON value on a line of standard output: a result. A number that is none would become null unseen, so it is refused. */
export function printResult(result: Readonly<Record<string, unknown>>): void {
  const line = JSON.stringify(result, (key, value: unknown) => {
    if (typeof value === 'number' && !Number.isFinite(value))
      throw new RangeError(`"${key}" is not a number: ${value}`);
    return value;
  });
  process.stdout.write(`${line}\n`);
}

/** Words for a person, on standard error. */
export function say(words: string): void {
  process.stderr.write(`${words}\n`);
}
