/** The nouns by which the description is ordered, as they stand in paths. */
export const tags = [
  { name: 'Weather', description: 'Weather files, batches of them and the years that come out of them.' },
  { name: 'Stations', description: 'Places where weather was recorded.' },
  { name: 'Programmes', description: 'Bodies of work of a team.' },
  { name: 'Briefs', description: 'Written cooling requirements and their versions.' },
  { name: 'Sites', description: 'Candidate places, one by one and as tables.' },
  { name: 'Results', description: 'Scores, ledgers, surface and ranking of a programme, and the runs behind them.' },
  { name: 'Team', description: 'People, tokens, mails and the audit trail, for people alone.' },
  { name: 'Account', description: 'Signing in and one’s own account, for people alone.' },
  { name: 'Server', description: 'What is the same for everybody.' },
] as const;

type Tag = (typeof tags)[number]['name'];

/** The first that fits, so the more particular stand before. */
const places: readonly (readonly [RegExp, Tag])[] = [
  [/\/(weather-(files|batches|archives)|climate|derived)/, 'Weather'],
  [/\/teams\/:teamId\/events$/, 'Weather'],
  [/\/teams\/:teamId\/stations/, 'Stations'],
  [/\/(briefs|presets)/, 'Briefs'],
  [/\/programmes\/:programmeId\/(sites|site-imports|ground)/, 'Sites'],
  [/\/programmes\/:programmeId\/members/, 'Programmes'],
  [/\/programmes\/:programmeId\/\w/, 'Results'],
  [/\/teams\/:teamId\/(runs|places|depression-hours)/, 'Results'],
  [/\/programmes/, 'Programmes'],
  [/\/api\/(openapi|method)/, 'Server'],
  [/\/api\/(teams|invitations)/, 'Team'],
];

export function tagOf(path: string): Tag {
  return places.find(([pattern]) => pattern.test(path))?.[1] ?? 'Account';
}
