import { useQuery, useQueryClient } from '@tanstack/react-query';
import { listMembers, renameTeam } from '../../../contract/members.ts';
import { call } from '../../../lib/api-client.ts';
import { errorSentence } from '../../../lib/api-error.ts';
import { apiQuery } from '../../../lib/api-query.ts';
import { issuesOf } from '../../../lib/issues-of.ts';
import { sessionQuery } from '../../../lib/session-query.ts';
import { useTeam } from '../../../lib/team-scope.ts';
import { Button } from '../../../ui/button.tsx';
import { FieldsForm } from '../../../ui/fields-form.tsx';
import { Loading } from '../../../ui/loading.tsx';
import { Notice } from '../../../ui/notice.tsx';
import { TeamHeader } from '../team-header.tsx';
import { Invitations } from './invitations.tsx';
import { MemberTable } from './member-table.tsx';

/** Who is in the team and as what; leads change it. */
export function PeoplePage() {
  const { teamId, teamName, role } = useTeam();
  const members = useQuery(apiQuery(listMembers, { params: { teamId }, query: {} }));
  const isLead = role === 'lead';
  return (
    <div className="mx-auto grid w-full max-w-[76rem] grid-cols-[minmax(0,1fr)] gap-8 px-5 pt-6 pb-16 max-sm:px-4">
      <TeamHeader title={`People of ${teamName}`}>
        Viewers look and comment. Planners also screen sites and shape briefs. Engineers also bring in weather and sign
        off. Leads also run the team.
      </TeamHeader>
      <section aria-labelledby="people">
        <h2 id="people" className="mb-2 text-name">
          People
        </h2>
        {members.isPending ? <Loading what="the people" /> : null}
        {members.isError ? (
          <Notice tone="wrong" live actions={<Button onClick={() => members.refetch()}>Try again</Button>}>
            {errorSentence(members.error)}
          </Notice>
        ) : null}
        {members.data ? <MemberTable items={members.data.items} /> : null}
      </section>
      {isLead ? <Invitations teamId={teamId} /> : null}
      {isLead ? <TeamName /> : null}
    </div>
  );
}

function TeamName() {
  const client = useQueryClient();
  const { teamId, teamName } = useTeam();
  return (
    <section aria-labelledby="team-name" className="max-w-[34rem]">
      <h2 id="team-name" className="mb-2 text-name">
        Name of the team
      </h2>
      <FieldsForm
        fields={[{ name: 'name', label: 'Name', initial: teamName }]}
        check={(body) => issuesOf(renameTeam.body.schema, body)}
        send={(body) => call(renameTeam, { params: { teamId }, query: {}, body })}
        onDone={() => client.invalidateQueries({ queryKey: sessionQuery.queryKey })}
        act="Save the name"
        done="Saved."
      />
    </section>
  );
}
