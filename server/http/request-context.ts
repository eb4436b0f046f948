import type { Role } from '#contract/accounts.ts';

/** Who asks. Guests and tokens join this list with the features that make them. */
export type Actor =
  | { readonly kind: 'signed-out' }
  | { readonly kind: 'person'; readonly personId: string; readonly roles: ReadonlyMap<string, Role> };

/** One file of an upload: already on the server's disk, hashed, not yet in the store of originals. */
export interface UploadedFile {
  /** Base name as the browser sent it, without folders and control characters. */
  readonly name: string;
  readonly bytes: number;
  /** SHA-256, hexadecimal. */
  readonly fingerprint: string;
  /** Where the bytes wait; removed after the handler whatever it does. */
  readonly temporaryPath: string;
}

/** Begins and ends what a browser is remembered by. */
export interface SessionControl {
  /** Checks e-mail and password of the parsed body; answers the person and begins a session under a new id, or null. */
  signIn(): Promise<string | null>;
  /** Begins a session, under a new id, for a person who has just been made. */
  begin(personId: string): Promise<void>;
  end(): Promise<void>;
}

/** What a route knows of its request beyond the parsed input. */
export interface RequestContext {
  readonly actor: Actor;
  readonly requestId: string;
  readonly ip: string;
  /** Aborted when the client goes away, or when the time for the answer is over. */
  readonly signal: AbortSignal;
  readonly uploads: readonly UploadedFile[];
  readonly session: SessionControl;
}
