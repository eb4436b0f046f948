/** A team whose lead is at work: people are made, invited and changed over HTTP, by a clock that the test moves. */
import type { Role } from '../../src/contract/accounts.ts';
import { MINUTE_MS, type MovingClock, makeMovingClock } from './moving-clock.ts';
import { type Agent, openWeb, PASSWORD, type WebForTests } from './open-web.ts';

export interface TeamOffice {
  readonly web: WebForTests;
  readonly clock: MovingClock;
  readonly teamId: string;
  readonly programmeId: string;
  /** Path of the team. */
  readonly base: string;
  readonly leadId: string;
  /** The lead, signed in; again after a session has run out. */
  lead(): Agent;
  signLeadInAgain(): Promise<void>;
  invite(email: string, more?: Readonly<Record<string, unknown>>): Promise<{ id: string }>;
  accept(key: string, more?: Readonly<Record<string, unknown>>): ReturnType<Agent['post']>;
  member(role: Role): Promise<{ personId: string; email: string; agent: Agent }>;
  /** After each test: a minute of its own for the next, so that no test spends the limits of another. */
  nextMinute(): void;
}

export async function openTeamOffice(): Promise<TeamOffice> {
  const clock = makeMovingClock();
  const web = await openWeb({ now: clock.now });
  const leadId = await web.makePerson('lead@example.org');
  const { teamId, programmeId } = await web.makeTeam(leadId);
  const base = `/api/teams/${teamId}`;
  let lead = await web.signIn('lead@example.org');
  let members = 0;
  return {
    ...{ web, clock, teamId, programmeId, base, leadId },
    lead: () => lead,
    async signLeadInAgain() {
      lead = await web.signIn('lead@example.org');
    },
    async invite(email, more = {}) {
      const body = { email, role: 'planner', lastDay: null, ...more };
      return (await lead.post(`${base}/invitations`).send(body).expect(200)).body;
    },
    accept: (key, more = {}) =>
      web
        .browser()
        .post('/api/invitations/acceptance')
        .send({ key, name: 'New Person', password: PASSWORD, ...more }),
    async member(role) {
      members += 1;
      const email = `member-${members}@example.org`;
      const personId = await web.makePerson(email);
      await web.addMember({ teamId, personId, role });
      return { personId, email, agent: await web.signIn(email) };
    },
    nextMinute: () => clock.moveMs(MINUTE_MS),
  };
}
