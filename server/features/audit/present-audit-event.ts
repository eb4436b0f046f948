import type { AuditEvent } from '#contract/audit.ts';
import type { AuditEventView } from './audit-read-model.ts';

export function presentAuditEvent(view: AuditEventView): AuditEvent {
  const { position, at, personId, personName, act, subject, requestId, hash } = view;
  const person = personId === null ? null : { id: personId, name: personName ?? 'Somebody who is gone' };
  return { position, at, person, act, subject, requestId, hash };
}
