/** The page's name in the browser's tab; React hoists it into the head. */
export function PageTitle({ children }: { children: string }) {
  return <title>{`${children} · Muslin`}</title>;
}
