import type { Router } from 'express';
import { getMethodChecks } from '#contract/method.ts';
import type { Deps } from '../../deps.ts';
import { mount } from '../../http/mount.ts';
import { readPublishedChecks } from './published-checks.ts';

export function methodRoutes(router: Router, deps: Deps): void {
  // The files come with the program: read once, when somebody first asks; a failed reading is tried again.
  let checks: ReturnType<typeof readPublishedChecks> | null = null;
  mount(router, deps, getMethodChecks, () => {
    checks ??= readPublishedChecks().catch((error: unknown) => {
      checks = null;
      throw error;
    });
    return checks;
  });
}
