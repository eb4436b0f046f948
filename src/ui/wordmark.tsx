/** The product's name, as it stands on every page. */
export function Wordmark({ large = false }: { large?: boolean }) {
  return (
    <span
      className={`font-wordmark text-indigo italic ${large ? 'text-[2.75rem] leading-none' : 'text-[1.625rem] leading-8'}`}
    >
      Muslin
    </span>
  );
}
