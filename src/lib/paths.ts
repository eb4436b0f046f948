/** Every address of the application. Patterns are for the router, functions for links. */
export const paths = {
  home: '/',
  signIn: {
    pattern: '/sign-in',
    /** `from` is where to go once signed in. */
    to: (from?: string) => (from && from !== '/' ? `/sign-in?from=${encodeURIComponent(from)}` : '/sign-in'),
  },
  setUp: { pattern: '/set-up/:key' },
  forgotten: '/new-password',
  newPassword: { pattern: '/new-password/:key' },
  newAddress: { pattern: '/new-address/:key' },
  invitation: { pattern: '/invitations/:key' },
  account: '/account',
  team: { pattern: '/teams/:teamId' },
  map: {
    pattern: 'programmes/:programmeId/map',
    to: (ids: { teamId: string; programmeId: string }, stationId?: string, briefId?: string) => {
      const asked = new URLSearchParams();
      if (briefId) asked.set(BRIEF_PARAM, briefId);
      if (stationId) asked.set(PLACE_PARAM, stationId);
      return `/teams/${ids.teamId}/programmes/${ids.programmeId}/map${asked.size > 0 ? `?${asked}` : ''}`;
    },
  },
  briefs: {
    pattern: 'programmes/:programmeId/briefs',
    to: (ids: { teamId: string; programmeId: string }) => `/teams/${ids.teamId}/programmes/${ids.programmeId}/briefs`,
  },
  brief: {
    pattern: 'programmes/:programmeId/briefs/:briefId',
    to: (ids: { teamId: string; programmeId: string; briefId: string }) =>
      `/teams/${ids.teamId}/programmes/${ids.programmeId}/briefs/${ids.briefId}`,
  },
  weather: {
    pattern: 'weather',
    /** `asked` narrows the library: to a batch, a station, a status. */
    to: (teamId: string, asked: { batch?: string; station?: string; status?: string } = {}) => {
      const search = new URLSearchParams(asked);
      return `/teams/${teamId}/weather${search.size > 0 ? `?${search}` : ''}`;
    },
  },
  weatherFile: {
    pattern: 'weather/:fileId',
    to: (teamId: string, fileId: string) => `/teams/${teamId}/weather/${fileId}`,
  },
  climate: {
    pattern: 'weather/:fileId/climate',
    to: (teamId: string, fileId: string) => `/teams/${teamId}/weather/${fileId}/climate`,
  },
  stations: { pattern: 'stations', to: (teamId: string) => `/teams/${teamId}/stations` },
  station: {
    pattern: 'stations/:stationId',
    to: (teamId: string, stationId: string) => `/teams/${teamId}/stations/${stationId}`,
  },
  people: { pattern: 'team', to: (teamId: string) => `/teams/${teamId}/team` },
  programmes: { pattern: 'team/programmes', to: (teamId: string) => `/teams/${teamId}/team/programmes` },
  mails: { pattern: 'team/mails', to: (teamId: string) => `/teams/${teamId}/team/mails` },
  tokens: { pattern: 'team/tokens', to: (teamId: string) => `/teams/${teamId}/team/tokens` },
  method: { pattern: 'method', to: (teamId: string) => `/teams/${teamId}/method` },
  gallery: { pattern: '/gallery' },
} as const;

/** The chosen place of the map page, in the query of its address. */
export const PLACE_PARAM = 'place';

/** The brief that the map is drawn under, in the query of its address; without it the one saved last. */
export const BRIEF_PARAM = 'brief';

/** Where to go after signing in: only a path of this application, never another host. */
export function safeReturn(from: string | null): string {
  if (from === null || !/^\/(?![/\\])/.test(from)) return paths.home;
  return from.startsWith(paths.signIn.pattern) ? paths.home : from;
}
