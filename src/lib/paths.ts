/** Every address of the application. Patterns are for the router, functions for links. */
export const paths = {
  home: '/',
  signIn: {
    pattern: '/sign-in',
    /** `from` is where to go once signed in. */
    to: (from?: string) => (from && from !== '/' ? `/sign-in?from=${encodeURIComponent(from)}` : '/sign-in'),
  },
  setUp: { pattern: '/set-up/:key' },
  team: { pattern: '/teams/:teamId' },
  map: {
    pattern: 'programmes/:programmeId/map',
    to: (ids: { teamId: string; programmeId: string }, stationId?: string) =>
      `/teams/${ids.teamId}/programmes/${ids.programmeId}/map${stationId ? `?${PLACE_PARAM}=${stationId}` : ''}`,
  },
  weather: { pattern: 'weather', to: (teamId: string) => `/teams/${teamId}/weather` },
  weatherFile: {
    pattern: 'weather/:fileId',
    to: (teamId: string, fileId: string) => `/teams/${teamId}/weather/${fileId}`,
  },
  gallery: { pattern: '/gallery' },
} as const;

/** The chosen place of the map page, in the query of its address. */
export const PLACE_PARAM = 'place';

/** Where to go after signing in: only a path of this application, never another host. */
export function safeReturn(from: string | null): string {
  if (from === null || !/^\/(?![/\\])/.test(from)) return paths.home;
  return from.startsWith(paths.signIn.pattern) ? paths.home : from;
}
