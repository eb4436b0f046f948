import type { Membership, Session } from '../contract/accounts.ts';
import { paths } from '../lib/paths.ts';

export interface PageLink {
  readonly to: string;
  readonly label: string;
}

export type ProgrammeLink = PageLink;

/** The pages of a team in the order of the bar; those of a programme are of its first. */
export function pageLinks({ teamId, programmes: [programme] }: Membership): readonly PageLink[] {
  const of = (page: { to(key: { teamId: string; programmeId: string }): string }, label: string): PageLink[] =>
    programme === undefined ? [] : [{ to: page.to({ teamId, programmeId: programme.id }), label }];
  return [
    ...of(paths.map, 'Map'),
    { to: paths.weather.to(teamId), label: 'Weather' },
    ...of(paths.sites, 'Sites'),
    ...of(paths.briefs, 'Briefs'),
    { to: paths.people.to(teamId), label: 'Team' },
    { to: paths.method.to(teamId), label: 'Method' },
  ];
}

/** The maps of every programme of every team, by name; with their team where there are several. */
export function programmeLinks(memberships: readonly Membership[]): readonly ProgrammeLink[] {
  return memberships.flatMap(({ teamId, teamName, programmes }) =>
    programmes.map(({ id, name }) => ({
      to: paths.map.to({ teamId, programmeId: id }),
      label: memberships.length > 1 ? `${teamName}: ${name}` : name,
    })),
  );
}

/** "ann@school.example, planner". */
export function accountWords({ email }: NonNullable<Session['person']>, { role }: Membership): string {
  return `${email}, ${role}`;
}
