/** A mail as words: the same in plain text and HTML, without pictures, scripts or anything that is fetched. */
export interface MailWords {
  /** One line each; control characters are taken out. */
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly link: { readonly words: string; readonly url: string } | null;
  /** Why the mail came and how to have no more of them. */
  readonly foot: string;
}

export interface WrittenMail {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export function writtenMail({ subject, paragraphs, link, foot }: MailWords): WrittenMail {
  const parts = [...paragraphs, ...(link === null ? [] : [`${link.words}:\n${link.url}`]), `--\n${foot}`];
  const inHtml = [
    ...paragraphs.map((words) => `<p>${escaped(words)}</p>`),
    ...(link === null ? [] : [`<p><a href="${escaped(link.url)}">${escaped(link.words)}</a></p>`]),
    `<p><small>${escaped(foot)}</small></p>`,
  ];
  return {
    subject: onOneLine(subject),
    text: `${parts.join('\n\n')}\n`,
    html: `<!doctype html>\n<html lang="en"><head><meta charset="utf-8"><title>${escaped(onOneLine(subject))}</title></head><body>\n${inHtml.join('\n')}\n</body></html>\n`,
  };
}

/** A line break in a head line would begin another head line. */
function onOneLine(words: string): string {
  return words.replace(/\p{Cc}+/gu, ' ').trim();
}

function escaped(words: string): string {
  return words
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replaceAll("'", '&#39;');
}
