import type { Role } from '#contract/accounts.ts';
import type { TokenScope } from '#contract/tokens.ts';

/** Who asks. Guests join this list with the feature that makes them. */
export type Actor =
  | { readonly kind: 'signed-out' }
  | TokenActor
  | ({ readonly kind: 'person'; readonly personId: string } & Standing);

/** What a person is in which teams, as of now. */
export interface Standing {
  readonly roles: ReadonlyMap<string, Role>;
  /** Programmes of these teams that are open to some members, and not to this person. */
  readonly closedProgrammes: ReadonlySet<string>;
  /** Of each team a number that grows with every change of what its map and sites show; read before anything of the team is. */
  readonly revisions: ReadonlyMap<string, string>;
}

/** A program with an API token: it acts for the person who made the token, within one team and the token's scopes. */
export interface TokenActor {
  readonly kind: 'token';
  readonly tokenId: string;
  readonly teamId: string;
  readonly personId: string;
  readonly scopes: readonly TokenScope[];
}

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
  /** Of the request; never told to anybody. */
  readonly id: string;
  /** The person to whom e-mail and password of the parsed body belong, or null. */
  checkPassword(): Promise<string | null>;
  /** Begins a session, under a new id. */
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
