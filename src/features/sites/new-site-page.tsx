import { useMutation } from '@tanstack/react-query';
import { FormProvider, useForm } from 'react-hook-form';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { errorSentence } from '../../lib/api-error.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { paths } from '../../lib/paths.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button, buttonLook } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { emptyDraft, type SiteDraft, type SiteValues, siteResolver } from './site-draft.ts';
import { SiteFields } from './site-fields.tsx';
import { useSiteActs } from './site-queries.ts';

/** One site by hand. */
export function NewSitePage() {
  const { teamId } = useTeam();
  const { programmeId = '' } = useParams();
  const programme = { teamId, programmeId };
  const navigate = useNavigate();
  const acts = useSiteActs(programme);
  const form = useForm<SiteDraft, unknown, SiteValues>({ defaultValues: emptyDraft, resolver: siteResolver });
  const make = useMutation({
    mutationFn: acts.make,
    onSuccess: ({ id }) => navigate(paths.site.to({ ...programme, siteId: id })),
  });
  return (
    <div className="mx-auto w-full max-w-[44rem] px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>New site</PageTitle>
      <Link to={paths.sites.to(programme)} className="mb-2 inline-block text-fine">
        All sites
      </Link>
      <h1 className="mb-5 text-title">New site</h1>
      <FormProvider {...form}>
        <form noValidate className="grid gap-5" onSubmit={form.handleSubmit((values) => make.mutate(values))}>
          <SiteFields programme={programme} />
          {make.isError ? (
            <Notice tone="wrong" live title="Not made">
              {errorSentence(make.error)}
            </Notice>
          ) : null}
          <div className="flex flex-wrap gap-3">
            <Button type="submit" look="primary" busy={make.isPending}>
              Make the site
            </Button>
            <Link to={paths.sites.to(programme)} className={buttonLook('plain')}>
              Leave it
            </Link>
          </div>
        </form>
      </FormProvider>
    </div>
  );
}
