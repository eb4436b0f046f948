/** Bytes changed one by one, or a run of them lost or doubled. */
export function damagedBytes(
  bytes: Uint8Array,
  changes: readonly { at: number; byte: number }[],
  how: 'change' | 'lose' | 'double',
): Uint8Array {
  if (how === 'change') {
    const changed = Uint8Array.from(bytes);
    for (const { at, byte } of changes) changed[at] = byte;
    return changed;
  }
  const [first] = changes;
  const from = first?.at ?? 0;
  const to = Math.min(bytes.length, from + (first?.byte ?? 0) * (changes.length * changes.length));
  const head = bytes.subarray(0, how === 'lose' ? from : to);
  const tail = bytes.subarray(how === 'lose' ? to : from);
  const joined = new Uint8Array(head.length + tail.length);
  joined.set(head);
  joined.set(tail, head.length);
  return joined;
}
