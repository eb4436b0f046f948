/** Reads what build.ts needs of a file in the classic form of netCDF (version 1, no record dimension; "NetCDF Classic Format"). */
const DIMENSIONS = 10;
const VARIABLES = 11;
const ATTRIBUTES = 12;
const FLOAT = 5;
/** Bytes of a value by type: byte, char, short, int, float, double. */
const TYPE_BYTES = [0, 1, 1, 2, 4, 4, 8];

export interface NetcdfVariable {
  /** Lengths of its dimensions, the slowest first. */
  readonly shape: readonly number[];
  /** @throws Error unless the values are 32-bit floats */
  floats(): Float32Array;
}

/** The variables of a file by name. @throws Error when the file is none of the kind */
export function readNetcdf(bytes: Uint8Array): ReadonlyMap<string, NetcdfVariable> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (view.getUint32(0) !== 0x43444601) throw new Error('not a classic netCDF file of version 1');
  const header = new Header(view, 8);
  const lengths = header.list(DIMENSIONS, () => {
    header.text();
    return header.integer();
  });
  header.attributes();
  const variables = header.list(VARIABLES, () => {
    const name = header.text();
    const shape = header.several(() => lengths[header.integer()] ?? 0);
    header.attributes();
    const type = header.integer();
    header.integer();
    const begin = header.integer();
    return [name, { shape, floats: () => floatsAt(view, { name, type, begin, shape }) }] as const;
  });
  return new Map(variables);
}

function floatsAt(
  view: DataView,
  variable: { name: string; type: number; begin: number; shape: readonly number[] },
): Float32Array {
  const { begin, name, shape, type } = variable;
  if (type !== FLOAT) throw new Error(`${name} holds no 32-bit floats`);
  const values = new Float32Array(shape.reduce((product, length) => product * length, 1));
  for (let index = 0; index < values.length; index++) values[index] = view.getFloat32(begin + 4 * index);
  return values;
}

/** Goes through the header; everything in it begins on a multiple of 4 bytes. */
class Header {
  readonly #view: DataView;
  #at: number;

  constructor(view: DataView, at: number) {
    this.#view = view;
    this.#at = at;
  }

  integer(): number {
    this.#at += 4;
    return this.#view.getUint32(this.#at - 4);
  }

  text(): string {
    const length = this.integer();
    let text = '';
    for (let index = 0; index < length; index++) text += String.fromCharCode(this.#view.getUint8(this.#at + index));
    this.#skip(length);
    return text;
  }

  several<T>(one: () => T): T[] {
    return Array.from({ length: this.integer() }, one);
  }

  list<T>(tag: number, one: () => T): T[] {
    const found = this.integer();
    if (found !== tag && found !== 0) throw new Error(`the netCDF header has ${found} where ${tag} belongs`);
    return this.several(one);
  }

  attributes(): void {
    this.list(ATTRIBUTES, () => {
      this.text();
      const bytes = TYPE_BYTES[this.integer()] ?? 0;
      this.#skip(bytes * this.integer());
    });
  }

  #skip(bytes: number): void {
    this.#at += Math.ceil(bytes / 4) * 4;
  }
}
