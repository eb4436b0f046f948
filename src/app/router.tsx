import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { paths } from '../lib/paths.ts';
import { FailedPage } from './failed-page.tsx';
import { HomeRedirect } from './home-redirect.tsx';
import { NotFoundPage } from './not-found-page.tsx';
import { SignedIn } from './signed-in.tsx';
import { TeamPages } from './team-pages.tsx';

/** Every page is fetched when it is first visited; the map brings its own engine with it. */
const routes: RouteObject[] = [
  {
    errorElement: <FailedPage />,
    // The first page's own part is on its way; it says itself when it takes long.
    HydrateFallback: () => null,
    children: [
      {
        path: paths.signIn.pattern,
        lazy: async () => ({ Component: (await import('../features/accounts/sign-in-page.tsx')).SignInPage }),
      },
      {
        path: paths.setUp.pattern,
        lazy: async () => ({ Component: (await import('../features/accounts/set-up-page.tsx')).SetUpPage }),
      },
      {
        path: paths.forgotten,
        lazy: async () => ({ Component: (await import('../features/accounts/new-password-page.tsx')).ForgottenPage }),
      },
      {
        path: paths.newPassword.pattern,
        lazy: async () => ({ Component: (await import('../features/accounts/new-password-page.tsx')).NewPasswordPage }),
      },
      {
        path: paths.newAddress.pattern,
        lazy: async () => ({ Component: (await import('../features/accounts/new-address-page.tsx')).NewAddressPage }),
      },
      {
        path: paths.invitation.pattern,
        lazy: async () => ({ Component: (await import('../features/accounts/invitation-page.tsx')).InvitationPage }),
      },
      {
        Component: SignedIn,
        children: [
          { path: paths.home, Component: HomeRedirect },
          {
            path: paths.account,
            lazy: async () => ({ Component: (await import('../features/accounts/account-page.tsx')).AccountPage }),
          },
          {
            path: paths.team.pattern,
            Component: TeamPages,
            children: [
              { index: true, Component: HomeRedirect },
              {
                path: paths.map.pattern,
                lazy: async () => ({ Component: (await import('./pages/map/map-page.tsx')).MapPage }),
              },
              {
                path: paths.briefs.pattern,
                lazy: async () => ({ Component: (await import('../features/briefs/briefs-page.tsx')).BriefsPage }),
              },
              {
                path: paths.brief.pattern,
                lazy: async () => ({ Component: (await import('../features/briefs/brief-page.tsx')).BriefPage }),
              },
              {
                path: paths.sites.pattern,
                lazy: async () => ({ Component: (await import('../features/sites/sites-page.tsx')).SitesPage }),
              },
              {
                path: paths.newSite.pattern,
                lazy: async () => ({ Component: (await import('../features/sites/new-site-page.tsx')).NewSitePage }),
              },
              {
                path: paths.siteImport.pattern,
                lazy: async () => ({ Component: (await import('../features/sites/import-page.tsx')).ImportPage }),
              },
              {
                path: paths.site.pattern,
                lazy: async () => ({ Component: (await import('../features/sites/site-page.tsx')).SitePage }),
              },
              {
                path: paths.compare.pattern,
                lazy: async () => ({ Component: (await import('./pages/compare/compare-page.tsx')).ComparePage }),
              },
              {
                path: paths.weather.pattern,
                lazy: async () => ({
                  Component: (await import('../features/weather/weather-library-page.tsx')).WeatherLibraryPage,
                }),
              },
              {
                path: paths.weatherFile.pattern,
                lazy: async () => ({
                  Component: (await import('../features/weather/weather-record-page.tsx')).WeatherRecordPage,
                }),
              },
              {
                path: paths.climate.pattern,
                lazy: async () => ({ Component: (await import('../features/weather/climate-page.tsx')).ClimatePage }),
              },
              {
                path: paths.stations.pattern,
                lazy: async () => ({
                  Component: (await import('../features/stations/stations-page.tsx')).StationsPage,
                }),
              },
              {
                path: paths.station.pattern,
                lazy: async () => ({ Component: (await import('../features/stations/station-page.tsx')).StationPage }),
              },
              {
                path: paths.people.pattern,
                lazy: async () => ({
                  Component: (await import('../features/teams/people/people-page.tsx')).PeoplePage,
                }),
              },
              {
                path: paths.programmes.pattern,
                lazy: async () => ({
                  Component: (await import('../features/teams/programmes/programmes-page.tsx')).ProgrammesPage,
                }),
              },
              {
                path: paths.mails.pattern,
                lazy: async () => ({ Component: (await import('../features/teams/mails/mails-page.tsx')).MailsPage }),
              },
              {
                path: paths.teamData.pattern,
                lazy: async () => ({ Component: (await import('../features/teams/data/data-page.tsx')).DataPage }),
              },
              {
                path: paths.tokens.pattern,
                lazy: async () => ({
                  Component: (await import('../features/teams/tokens/tokens-page.tsx')).TokensPage,
                }),
              },
              {
                path: paths.audit.pattern,
                lazy: async () => ({ Component: (await import('./pages/audit/audit-page.tsx')).AuditPage }),
              },
              {
                path: paths.api.pattern,
                lazy: async () => ({ Component: (await import('./pages/api/api-page.tsx')).ApiPage }),
              },
              {
                path: paths.method.pattern,
                lazy: async () => ({ Component: (await import('../features/method/method-page.tsx')).MethodPage }),
              },
              { path: '*', Component: NotFoundPage },
            ],
          },
        ],
      },
      ...(import.meta.env.DEV
        ? [
            {
              path: paths.gallery.pattern,
              lazy: async () => ({ Component: (await import('./gallery/gallery-page.tsx')).GalleryPage }),
            },
          ]
        : []),
      { path: '*', element: <NotFoundPage isAlone /> },
    ],
  },
];

export function makeRouter() {
  return createBrowserRouter(routes);
}
