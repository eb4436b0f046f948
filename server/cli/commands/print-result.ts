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

/** A table of many lines on standard output; resolves when all of it is written, since a pipe takes it in parts. */
export function printTable(text: string): Promise<void> {
  return new Promise((resolve, reject) => {
    process.stdout.write(text, (error) => (error ? reject(error) : resolve()));
  });
}
