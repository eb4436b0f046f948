/** A ruled square with the letters of a site, as on the map. */
export function SiteMark({ letters }: { letters: string }) {
  return (
    <span className="inline-grid h-6 min-w-6 flex-none place-items-center border border-ink bg-paper px-1 text-fine font-semibold">
      {letters}
    </span>
  );
}
