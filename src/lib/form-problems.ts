import { isApiError } from './api-error.ts';

/** Messages of a form by field; `form` holds what belongs to no field. */
export interface FormProblems {
  readonly fields: Readonly<Record<string, string>>;
  readonly form: readonly string[];
}

export const noProblems: FormProblems = { fields: {}, form: [] };

interface ParsedIssue {
  readonly path: readonly PropertyKey[];
  readonly message: string;
}

/** The faults that a contract's schema found, the first of each field. */
export function problemsOfIssues(issues: readonly ParsedIssue[]): FormProblems {
  return gather(issues.map((issue) => ({ field: String(issue.path[0] ?? ''), message: issue.message })));
}

/** The located faults of an answer; null when the fault lies in no field. */
export function problemsOfError(error: unknown): FormProblems | null {
  if (!isApiError(error) || error.problems.length === 0) return null;
  return gather(
    error.problems.map((problem) => ({
      field: (problem.path ?? '').replace(/^body\./, ''),
      message: problem.message,
    })),
  );
}

function gather(found: readonly { field: string; message: string }[]): FormProblems {
  const fields: Record<string, string> = {};
  const form: string[] = [];
  for (const { field, message } of found) {
    if (field === '') form.push(message);
    else fields[field] ??= message;
  }
  return { fields, form };
}
