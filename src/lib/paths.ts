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
  sites: {
    pattern: 'programmes/:programmeId/sites',
    /** `filter` narrows the table, as to those that wait for a person. */
    to: (ids: { teamId: string; programmeId: string }, filter?: string) =>
      `/teams/${ids.teamId}/programmes/${ids.programmeId}/sites${filter ? `?${new URLSearchParams({ filter })}` : ''}`,
  },
  newSite: {
    pattern: 'programmes/:programmeId/sites/new',
    to: (ids: { teamId: string; programmeId: string }) =>
      `/teams/${ids.teamId}/programmes/${ids.programmeId}/sites/new`,
  },
  siteImport: {
    pattern: 'programmes/:programmeId/sites/import',
    to: (ids: { teamId: string; programmeId: string }) =>
      `/teams/${ids.teamId}/programmes/${ids.programmeId}/sites/import`,
  },
  site: {
    pattern: 'programmes/:programmeId/sites/:siteId',
    /** `settling`: on the way from one flagged site to the next. */
    to: (ids: { teamId: string; programmeId: string; siteId: string }, settling = false) =>
      `/teams/${ids.teamId}/programmes/${ids.programmeId}/sites/${ids.siteId}${settling ? '?settling=1' : ''}`,
  },
  compare: {
    pattern: 'programmes/:programmeId/compare',
    /** Up to six places, or one place under several briefs; without any it asks for them. */
    to: (
      ids: { teamId: string; programmeId: string },
      asked: {
        places?: readonly { kind: 'station' | 'site'; id: string }[];
        briefs?: readonly string[];
        years?: readonly string[];
      } = {},
    ) => {
      const search = new URLSearchParams();
      const places = (asked.places ?? []).map(({ kind, id }) => `${kind}:${id}`);
      for (const [name, values] of [
        ['places', places],
        ['briefs', asked.briefs ?? []],
        ['years', asked.years ?? []],
      ] as const)
        if (values.length > 0) search.set(name, values.join(','));
      const base = `/teams/${ids.teamId}/programmes/${ids.programmeId}/compare`;
      return search.size > 0 ? `${base}?${search}` : base;
    },
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
  teamData: { pattern: 'team/data', to: (teamId: string) => `/teams/${teamId}/team/data` },
  audit: { pattern: 'team/audit', to: (teamId: string) => `/teams/${teamId}/team/audit` },
  api: { pattern: 'team/api', to: (teamId: string) => `/teams/${teamId}/team/api` },
  method: { pattern: 'method', to: (teamId: string) => `/teams/${teamId}/method` },
  gallery: { pattern: '/gallery' },
} as const;

/** The chosen station of the map page, in the query of its address. */
export const PLACE_PARAM = 'place';

/** The brief that the map is drawn under, in the query of its address; without it the one saved last. */
export const BRIEF_PARAM = 'brief';

/** The rest of the map's state in its address: a chosen site, a clicked point, what is drawn and how. */
export const SITE_PARAM = 'site';
export const POINT_PARAM = 'at';
export const LAYER_PARAM = 'layer';
export const DRAFT_PARAM = 'draft';
export const FIND_PARAM = 'find';
export const LIST_PARAM = 'list';
export const VIEW_PARAM = 'view';
/** Off: the score between stations is not drawn. */
export const SURFACE_PARAM = 'surface';

/** Where to go after signing in: only a path of this application, never another host. */
export function safeReturn(from: string | null): string {
  if (from === null || !/^\/(?![/\\])/.test(from)) return paths.home;
  return from.startsWith(paths.signIn.pattern) ? paths.home : from;
}
