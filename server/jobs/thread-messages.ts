/** What a pool and its threads say to one another. */
export interface Posted<Task> {
  readonly id: number;
  readonly task: Task;
}

export type Reply<Answer> =
  | { readonly id: number; readonly ok: true; readonly answer: Answer }
  | { readonly id: number; readonly ok: false; readonly message: string; readonly stack: string | null };
