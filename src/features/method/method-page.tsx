import { Fragment, type ReactNode } from 'react';
import { METHOD_VERSION } from '../../engine/conventions.ts';
import { PageTitle } from '../../lib/page-title.tsx';
import { MarkedText } from './marked-text.tsx';
import { MethodChecks } from './method-checks.tsx';
import { ClassTable, DefaultsTable, GradeTable, ScoreTable } from './method-tables.tsx';
import { cautions, type MethodSection, methodSections } from './method-text.ts';

/** The tables that stand behind a section of the text. */
const tables: Readonly<Record<string, { id: string; title: string; Table: () => ReactNode }>> = {
  stages: { id: 'hour-classes', title: 'Hour classes', Table: ClassTable },
  verdict: { id: 'score', title: 'Score', Table: ScoreTable },
  place: { id: 'grade', title: 'Grade', Table: GradeTable },
};

const contents: readonly (readonly [id: string, title: string])[] = [
  ['cautions', 'Cautions'],
  ...methodSections.flatMap(({ id, title }) => {
    const table = tables[id];
    return [[id, title] as const, ...(table === undefined ? [] : [[table.id, table.title] as const])];
  }),
  ['defaults', 'Defaults'],
  ['checks', 'Checks'],
];

/** What is computed, with what is assumed, and the published values that the engine is held against. */
export function MethodPage() {
  return (
    <div className="mx-auto flex w-full max-w-[76rem] gap-10 px-5 pt-6 pb-16 max-sm:px-4">
      <PageTitle>Method</PageTitle>
      <nav aria-label="On this page" className="no-print sticky top-6 w-44 flex-none self-start max-lg:hidden">
        <ul className="space-y-1.5 text-fine">
          {contents.map(([id, title]) => (
            <li key={id}>
              <a href={`#${id}`} className="no-underline hover:underline">
                {title}
              </a>
            </li>
          ))}
        </ul>
      </nav>
      <div className="min-w-0 flex-1">
        <header className="mb-6">
          <h1 className="text-title">Method</h1>
          <p className="mt-1 text-soft">
            What is computed, in the order in which data flows. Method version {METHOD_VERSION}, which every stored
            result names.
          </p>
        </header>
        <section aria-labelledby="cautions">
          <h2 id="cautions" className="mb-2 text-name">
            Cautions that every result carries
          </h2>
          <ul className="max-w-[70ch] list-disc space-y-1 pl-5">
            {cautions.map((caution) => (
              <li key={caution}>{caution}</li>
            ))}
          </ul>
        </section>
        {methodSections.map((section) => {
          const Table = tables[section.id]?.Table;
          return (
            <Fragment key={section.id}>
              <Section section={section} />
              {Table === undefined ? null : <Table />}
            </Fragment>
          );
        })}
        <DefaultsTable />
        <MethodChecks />
      </div>
    </div>
  );
}

function Section({ section: { id, title, paragraphs, formulas = [] } }: { section: MethodSection }) {
  return (
    <section aria-labelledby={id} className="mt-8">
      <h2 id={id} className="mb-2 text-name">
        {title}
      </h2>
      {paragraphs.map((paragraph) => (
        <p key={paragraph} className="mb-2 max-w-[70ch]">
          {paragraph}
        </p>
      ))}
      {formulas.length > 0 ? (
        <dl className="mt-3 max-w-[52rem] border-b border-line">
          {formulas.map(({ name, formula, where }) => (
            <div
              key={name}
              className="grid grid-cols-[13rem_1fr] gap-x-4 border-t border-line py-1.5 max-sm:grid-cols-1"
            >
              <dt className="text-soft">{name}</dt>
              <dd>
                <span className="serif text-lead">
                  <MarkedText>{formula}</MarkedText>
                </span>
                {where === undefined ? null : (
                  <span className="block text-fine text-soft">
                    <MarkedText>{where}</MarkedText>
                  </span>
                )}
              </dd>
            </div>
          ))}
        </dl>
      ) : null}
    </section>
  );
}
