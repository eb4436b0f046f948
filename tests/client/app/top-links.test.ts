import { describe, expect, it } from 'vitest';
import { pageLinks } from '../../../src/app/top-links.ts';
import { Role } from '../../../src/contract/accounts.ts';

const team = {
  teamId: '0f0e7a52-9c1b-4f0e-8d7e-2b8f5e6a1c11',
  teamName: 'Veldway Schools',
  invented: true,
  programmes: [{ id: '5c0f5b1e-6a51-4a5c-9a57-0d2b0e6a7f22', name: 'Schools' }],
};

const labels = (role: Role) => pageLinks({ ...team, role }).map(({ label }) => label);

describe('the pages of a team', () => {
  it('offer the team itself to everyone in it', () => {
    const offered = Role.options.filter((role) => labels(role).includes('Team'));
    expect(offered).toEqual(Role.options);
  });

  it('stand in one order, and without a programme neither map, sites nor briefs are among them', () => {
    expect(labels('lead')).toEqual(['Map', 'Weather', 'Sites', 'Briefs', 'Team', 'Method']);
    expect(pageLinks({ ...team, programmes: [], role: 'viewer' }).map(({ label }) => label)).toEqual([
      'Weather',
      'Team',
      'Method',
    ]);
  });
});
