/**
 * Who may import whom, as data. The first row whose `from` fits a file decides; a file that no row fits, and an import that
 * its row does not list, are refused. Patterns: `*` within a folder, `**` across folders.
 */
export interface ImportRule {
  readonly from: string;
  readonly may: readonly string[];
  /** May be imported for their types alone. */
  readonly mayTypes?: readonly string[];
}

/** `{self}` stands for the folder of the feature that the file belongs to. */
export const OWN_FEATURE = '{self}';

const browserPackages = [
  'react',
  'react-dom',
  'react-dom/client',
  'react-router-dom',
  '@tanstack/react-query',
  'react-aria-components',
  'react-hook-form',
  '@hookform/resolvers/**',
  'd3-*',
];
const shippedFonts = ['@fontsource/**', '@fontsource-variable/**'];
const styles = ['src/**/*.css', ...shippedFonts];
const pure = ['src/engine/**', 'src/contract/**', 'src/charts/**'];

/** What any part of the server may use: an error for the caller, the log, the words of a request. */
const serverWords = ['server/http/app-error.ts', 'server/log.ts'];
/** Rows hold hours as packed columns; how they are laid out is the engine's to say. */
const rowLayout = ['src/engine/reduction/packed-columns.ts', 'src/engine/reduction/weather-year.ts'];
const requestTypes = ['server/http/request-context.ts'];

export const importRules: readonly ImportRule[] = [
  { from: 'src/engine/**', may: ['src/engine/**', 'psychrolib'] },
  {
    // The rules that can be switched off are the engine's closed list.
    from: 'src/contract/weather-reading.ts',
    may: ['src/contract/**', 'zod/mini', 'src/engine/weather-files/quality/quality-options.ts'],
  },
  { from: 'src/contract/**', may: ['src/contract/**', 'zod/mini'], mayTypes: ['src/engine/**'] },
  { from: 'src/charts/**', may: ['src/charts/**', 'react', 'd3-*', 'src/engine/**'] },
  {
    from: 'src/map/**',
    may: [
      ...['src/map/**', 'src/ui/**', 'src/lib/**', ...pure, ...browserPackages, ...styles],
      ...['maplibre-gl', 'maplibre-gl/**', 'react-map-gl/**', 'terra-draw', 'terra-draw-maplibre-gl-adapter'],
    ],
    mayTypes: ['geojson'],
  },
  { from: 'src/ui/**', may: ['src/ui/**', 'src/lib/**', ...pure, ...browserPackages, ...styles] },
  { from: 'src/lib/**', may: ['src/lib/**', ...pure, ...browserPackages, 'zod/mini'] },
  {
    // Tables that people bring are read in the browser first.
    from: 'src/features/sites/read-table-file.ts',
    may: [OWN_FEATURE, 'src/lib/**', ...pure, 'papaparse'],
  },
  {
    from: 'src/features/*/**',
    may: [OWN_FEATURE, 'src/ui/**', 'src/charts/**', 'src/map/**', 'src/lib/**', ...pure, ...browserPackages],
  },
  { from: 'src/app/**', may: ['src/**', ...browserPackages, ...shippedFonts] },
  { from: 'src/main.tsx', may: ['src/app/**', 'src/**/*.css', ...browserPackages, ...shippedFonts] },

  { from: 'migrations/source.ts', may: ['migrations/*'], mayTypes: ['knex'] },
  { from: 'migrations/*', may: [], mayTypes: ['knex'] },

  {
    from: 'server/db/prepare-database.ts',
    may: ['server/db/**', 'migrations/source.ts', 'knex', 'pg', 'graphile-worker', 'node:*'],
  },
  {
    from: 'server/db/**',
    may: ['server/db/**', ...serverWords, ...pure, 'knex', 'pg', 'pg-copy-streams', 'node:**'],
  },
  {
    from: 'server/jobs/**',
    may: [
      ...['server/jobs/**', 'server/db/**', ...serverWords, ...pure],
      ...['graphile-worker', 'pg', 'knex', 'tsx/esm/api', 'node:**'],
    ],
  },
  {
    from: 'server/mail/**',
    may: ['server/mail/**', 'server/db/**', 'server/jobs/queue.ts', ...serverWords, ...pure, 'nodemailer'],
    mayTypes: ['knex'],
  },
  {
    from: 'server/storage/**',
    may: ['server/storage/**', ...serverWords, 'yauzl', 'yazl', '@aws-sdk/client-s3', 'node:**'],
  },
  {
    from: 'server/tiles/**',
    may: [
      ...['server/tiles/**', ...serverWords, 'src/engine/weather-files/relief.ts', 'data/relief/relief.bin'],
      ...['pmtiles', 'express', 'node:*'],
    ],
  },

  {
    from: 'server/features/*/*routes.ts',
    may: [
      OWN_FEATURE,
      'server/features/*/*read-model.ts',
      'server/http/**',
      'server/storage/zip-members.ts',
      'server/deps.ts',
      ...pure,
      'express',
      'node:*',
    ],
  },
  {
    from: 'server/features/*/*store.ts',
    may: [OWN_FEATURE, 'server/db/**', 'src/contract/**', ...rowLayout],
    mayTypes: ['knex', 'src/engine/**'],
  },
  {
    // Which station stands for a site is the method's to say, and every feature reads sites with theirs.
    from: 'server/features/sites/resolved-sites-read-model.ts',
    may: [OWN_FEATURE, 'src/engine/interpolation/**', 'src/engine/sites/**'],
    mayTypes: ['knex'],
  },
  {
    from: 'server/features/*/*read-model.ts',
    may: [OWN_FEATURE, 'server/db/**', 'src/contract/**', ...rowLayout],
    mayTypes: ['knex', 'src/engine/**'],
  },
  {
    from: 'server/features/*/policy.ts',
    may: ['server/http/policy.ts', 'src/contract/**'],
  },
  {
    // Verbs, presenters and what they share within a feature.
    from: 'server/features/*/*',
    may: [
      ...[OWN_FEATURE, 'server/features/*/*read-model.ts', 'server/db/**', ...serverWords, ...pure],
      ...['server/jobs/queue.ts', 'server/jobs/team-feed.ts', 'server/http/upload-name.ts'],
      ...['server/mail/write-mail.ts', 'server/mail/notify.ts', 'otplib', 'data/passwords/'],
      // The wrappers of zip and gzip: verbs say what becomes of what is inside.
      ...['server/storage/original-store.ts', 'server/storage/zip-members.ts', 'server/storage/inflate-gzip.ts'],
      'server/storage/write-zip.ts',
      ...['server/jobs/thread-pool.ts', 'server/jobs/web-*.ts', 'server/jobs/year-*.ts'],
      ...[
        'node:**',
        '@node-rs/argon2',
        '@photostructure/tz-lookup',
        'h3-js',
        'data/presets/presets.json',
        'data/checks/',
      ],
    ],
    mayTypes: ['knex', ...requestTypes],
  },
  {
    from: 'server/http/**',
    may: [
      ...['server/http/**', 'server/features/*/policy.ts', 'server/features/*/*read-model.ts', 'server/db/**'],
      ...['server/deps.ts', 'server/log.ts', 'src/contract/**', 'node:**', 'zod/mini', 'package.json'],
      ...['express', 'compression', 'helmet', 'multer'],
      ...['express-session', 'connect-pg-simple', 'passport', 'passport-local'],
    ],
    mayTypes: ['knex'],
  },
  {
    from: 'server/deps.ts',
    may: [],
    mayTypes: ['knex', 'server/log.ts', 'server/jobs/team-feed.ts', 'server/storage/original-store.ts'],
  },
  { from: 'server/log.ts', may: [] },
  {
    from: 'server/config.ts',
    may: ['zod/mini', 'node:*'],
    mayTypes: ['server/storage/s3-store.ts', 'server/mail/mailer.ts'],
  },
  { from: 'server/app.ts', may: ['server/**', 'express', 'compression', 'node:os'], mayTypes: ['src/engine/**'] },
  { from: 'server/web.ts', may: ['server/**', 'node:*'] },
  { from: 'server/*-thread.ts', may: ['server/features/**', 'server/jobs/**', 'server/tiles/relief.ts'] },
  { from: 'server/worker.ts', may: ['server/**', ...pure, 'node:*'] },
  { from: 'server/builders/**', may: ['server/**', ...pure, 'node:**'], mayTypes: ['knex'] },
  {
    from: 'server/cli/**',
    may: [
      'server/**',
      ...pure,
      'node:**',
      'zod/mini',
      'tsx/esm/api',
      'vite',
      'vitest/node',
      'pg',
      'knex',
      'data/demo/**',
    ],
  },
];
