import { AppError } from '../../http/app-error.ts';
import { weaknessOf } from './weak-password.ts';

/** @throws AppError invalid_input at `path` for a password that is among the first to be tried */
export function refuseWeakPassword(password: string, field: { path: string; about: readonly string[] }): void {
  const message = weaknessOf(password, field.about);
  if (message !== null) throw new AppError('invalid_input', message, [{ path: field.path, message }]);
}
