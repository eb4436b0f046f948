/** True of a run whose brief is of one of the programmes of the bound list: those that are closed to whoever asks. */
export const OF_CLOSED = `exists (
  select 1 from brief_versions as judged_by
  join briefs as judged on judged.id = judged_by.brief_id
  where judged_by.id = runs.brief_version_id and judged.programme_id = any(?::uuid[]))`;
