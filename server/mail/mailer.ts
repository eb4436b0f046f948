import nodemailer from 'nodemailer';
import type { UnsentMail } from './mail-store.ts';

export interface SmtpSettings {
  /** smtp:// or smtps://, with user and password where they are asked for. */
  readonly url: string;
  /** The address that mails come from. */
  readonly from: string;
}

export interface Mailer {
  /** @throws when the server does not take the mail */
  send(mail: UnsentMail & { readonly id: string }): Promise<void>;
  close(): void;
}

const PATIENCE_MS = 20_000;

/** Sends by SMTP. A mail that is sent twice, as after a crash, carries the same Message-ID, by which readers see one. */
export function smtpMailer({ url, from }: SmtpSettings): Mailer {
  const domain = from.split('@').at(-1)?.replace('>', '') ?? 'localhost';
  const transport = nodemailer.createTransport(
    { url, connectionTimeout: PATIENCE_MS, greetingTimeout: PATIENCE_MS, socketTimeout: PATIENCE_MS },
    { from, disableFileAccess: true, disableUrlAccess: true, headers: { 'Auto-Submitted': 'auto-generated' } },
  );
  return {
    async send({ id, recipient, subject, text, html }) {
      // As an object, so that no character of an address is read as the beginning of another.
      await transport.sendMail({
        to: { name: '', address: recipient },
        subject,
        text,
        html,
        messageId: `<${id}@${domain}>`,
      });
    },
    close: () => transport.close(),
  };
}
