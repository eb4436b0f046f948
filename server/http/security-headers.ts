import { randomBytes } from 'node:crypto';
import type { RequestHandler } from 'express';
import helmet from 'helmet';

const nonces = new WeakMap<object, string>();

/** The nonce of this reply's policy, for the one place in index.html that needs it. */
export function nonceOf(response: object): string {
  const nonce = nonces.get(response);
  if (nonce === undefined) throw new Error('The reply has not passed securityHeaders.');
  return nonce;
}

/** Everything comes from this site alone; nothing inline but what carries the nonce of its own reply. */
export function securityHeaders(): RequestHandler[] {
  const giveNonce: RequestHandler = (_request, response, next) => {
    nonces.set(response, randomBytes(16).toString('base64'));
    next();
  };
  const self = "'self'";
  const nobody = "'none'";
  const headers = helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: [nobody],
        scriptSrc: [self],
        styleSrc: [self, (_request, response) => `'nonce-${nonceOf(response)}'`],
        imgSrc: [self, 'data:', 'blob:'],
        fontSrc: [self],
        connectSrc: [self],
        workerSrc: [self],
        manifestSrc: [self],
        formAction: [self],
        baseUri: [nobody],
        frameAncestors: [nobody],
        objectSrc: [nobody],
      },
    },
    // Names this host only: what else runs under the same domain is not ours to decide.
    strictTransportSecurity: { maxAge: 31_536_000, includeSubDomains: false },
    // With no-referrer a browser would send "Origin: null" with a form of our own, which the origin guard refuses.
    referrerPolicy: { policy: 'same-origin' },
    xFrameOptions: { action: 'deny' },
  });
  return [giveNonce, headers];
}
