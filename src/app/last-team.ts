const KEY = 'muslin.team';

/** The team last in view on this browser, so that Home leads back to it; null where nothing may be kept. */
export function lastTeam(): string | null {
  try {
    return localStorage.getItem(KEY);
  } catch {
    return null;
  }
}

export function rememberTeam(teamId: string): void {
  try {
    localStorage.setItem(KEY, teamId);
  } catch {
    // A browser that keeps nothing still works; Home then leads to the first team.
  }
}
