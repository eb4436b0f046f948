/** Something outside the program stands in the way; the message says what and how to mend it. Ends a command with code 3. */
export class CouldNotRun extends Error {
  override readonly name = 'CouldNotRun';
}
