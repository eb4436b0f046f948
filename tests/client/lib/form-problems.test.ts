import { describe, expect, it } from 'vitest';
import { setUp, signIn } from '../../../src/contract/accounts.ts';
import { ApiError } from '../../../src/lib/api-error.ts';
import { problemsOfError, problemsOfIssues } from '../../../src/lib/form-problems.ts';

describe('problems of a form', () => {
  it('stand at their fields, every fault at once', () => {
    const parsed = setUp.body.schema.safeParse({ key: 'k', teamName: ' ', name: '', email: 'x', password: 'short' });
    expect(problemsOfIssues(parsed.error?.issues ?? []).fields).toEqual({
      teamName: 'Type a name.',
      name: 'Type a name.',
      email: 'Type an e-mail address, such as name@example.org.',
      password: 'Use 12 characters or more.',
    });
  });

  it('find none in a sign-in that is whole', () => {
    expect(signIn.body.schema.safeParse({ email: ' Name@Example.org ', password: 'p' }).data).toEqual({
      email: 'name@example.org',
      password: 'p',
    });
  });

  it('are read from an answer with or without the word body before the field', () => {
    const problems = [
      { path: 'body.email', message: 'One.' },
      { path: 'name', message: 'Two.' },
      { message: 'Three.' },
    ];
    const error = new ApiError({ code: 'invalid_input', message: 'x', problems });
    expect(problemsOfError(error)).toEqual({ fields: { email: 'One.', name: 'Two.' }, form: ['Three.'] });
  });

  it('are none where the fault lies in no field', () => {
    expect(problemsOfError(new ApiError({ code: 'wrong_sign_in', message: 'x' }))).toBeNull();
    expect(problemsOfError(new Error('x'))).toBeNull();
  });
});
