import { readFileSync } from 'node:fs';
import type { Router } from 'express';
import { type ApiDescription, getApiDescription } from '#contract/api.ts';
import type { Deps } from '../deps.ts';
import { accessOf } from './access-of.ts';
import { describeApi } from './describe-api.ts';
import { mount } from './mount.ts';

/** The API's description of itself, made at the first question. */
export function apiRoute(router: Router, deps: Deps): void {
  let description: ApiDescription | null = null;
  mount(router, deps, getApiDescription, async () => {
    description ??= describeApi({ version: versionOfProduct(), accessOf });
    return description;
  });
}

function versionOfProduct(): string {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  const { version }: { version: string } = JSON.parse(text);
  return version;
}
