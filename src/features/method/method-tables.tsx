import { ClassSwatch } from '../../charts/class-swatch.tsx';
import { classWords } from '../../charts/hour-class-words.ts';
import { componentWords } from '../../engine/brief/field-words.ts';
import { defaultScore } from '../../engine/brief/score-defaults.ts';
import { hourClasses } from '../../engine/hour-classes/hour-class.ts';
import { number } from '../../lib/format.ts';
import { ScrollInside } from '../../ui/scroll-inside.tsx';
import { methodDefaults } from './method-defaults.ts';
import { classRules, gradeRows } from './method-text.ts';

export function ClassTable() {
  return (
    <section aria-labelledby="hour-classes" className="mt-8">
      <h2 id="hour-classes" className="mb-2 text-name">
        Hour classes
      </h2>
      <p className="mb-2 max-w-[70ch]">
        Every hour of the year has exactly one class, the first of this list that fits. The classes add up to the hours
        of the year, which is tested on every run.
      </p>
      <table className="ruled">
        <caption className="sr-only">Hour classes in the order in which they are tested</caption>
        <thead>
          <tr>
            <th scope="col">Class</th>
            <th scope="col">When</th>
          </tr>
        </thead>
        <tbody>
          {hourClasses.map((hourClass) => (
            <tr key={hourClass}>
              <th scope="row" className="w-48 max-sm:w-32">
                <span className="flex items-baseline gap-2">
                  <ClassSwatch hourClass={hourClass} id={`method-${hourClass}`} />
                  {hourClass === 'damp' ? 'Too humid' : classWords[hourClass]}
                </span>
              </th>
              <td>{classRules[hourClass]}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="mt-2 max-w-[70ch]">
        The worst spell is the longest run of unmet hours with demand; closed hours neither count nor break it, up to
        six other hours are bridged, and a typical year’s run ends at a month joint.
      </p>
    </section>
  );
}

export function ScoreTable() {
  return (
    <section aria-labelledby="score" className="mt-8">
      <h2 id="score" className="mb-2 text-name">
        Score
      </h2>
      <p className="mb-2 max-w-[70ch]">
        Each component runs from 0 to 100 between two fixed anchors: s = 100 (x − a0) / (a100 − a0), never below 0 nor
        above 100. The score is the weighted sum, an integer from 0 to 100, with its arithmetic beside it. A component
        without meaning is not applicable and its weight is shared over the others. Anchors and weights are ours: a
        policy choice that the client accepts or changes in the brief. From 80 “most” of the demand, from 60 “much”,
        from 40 “some”, below “little”.
      </p>
      <ScrollInside label="Anchors of the score, scrolls sideways">
        <table className="ruled min-w-[30rem]">
          <caption className="sr-only">Components of the score with their weights and anchors</caption>
          <thead>
            <tr>
              <th scope="col">Component</th>
              <th scope="col" className="figure">
                Weight
              </th>
              <th scope="col" className="figure">
                Scores 0 at
              </th>
              <th scope="col" className="figure">
                Scores 100 at
              </th>
            </tr>
          </thead>
          <tbody>
            {defaultScore.map(({ component, weight, a0, a100 }) => (
              <tr key={component}>
                <th scope="row">{componentWords(component)}</th>
                <td className="figure">{weight}</td>
                <td className="figure">{a0}</td>
                <td className="figure">{a100}</td>
              </tr>
            ))}
          </tbody>
          <tfoot>
            <tr>
              <th scope="row">Sum</th>
              <td className="figure">{number(defaultScore.reduce((sum, { weight }) => sum + weight, 0))}</td>
              <td />
              <td />
            </tr>
          </tfoot>
        </table>
      </ScrollInside>
    </section>
  );
}

export function GradeTable() {
  return (
    <section aria-labelledby="grade" className="mt-8">
      <h2 id="grade" className="mb-2 text-name">
        Grade
      </h2>
      <p className="mb-2 max-w-[70ch]">
        How far the weather can be trusted for the place: the worst of these columns, beside the score and never in it.
        D is drawn hatched and not ranked.
      </p>
      <ScrollInside label="Grades, scrolls sideways">
        <table className="ruled min-w-[38rem]">
          <caption className="sr-only">What each grade asks for</caption>
          <thead>
            <tr>
              <th scope="col">Looked at</th>
              {['A', 'B', 'C', 'D'].map((grade) => (
                <th key={grade} scope="col">
                  {grade}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {gradeRows.map(([column, ...grades]) => (
              <tr key={column}>
                <th scope="row">{column}</th>
                {grades.map((words, place) => (
                  <td key={['A', 'B', 'C', 'D'][place]}>{words}</td>
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </section>
  );
}

export function DefaultsTable() {
  return (
    <section aria-labelledby="defaults" className="mt-8">
      <h2 id="defaults" className="mb-2 text-name">
        Defaults and where they come from
      </h2>
      <p className="mb-2 max-w-[70ch]">
        What a brief takes where it says nothing else. “Ours” is a choice of this program that any brief can change.
        Limits, caps and schedules come with the preset, which names its own sources.
      </p>
      <ScrollInside label="Defaults, scrolls sideways">
        <table className="ruled min-w-[38rem]">
          <caption className="sr-only">Defaults of a brief with their sources</caption>
          <thead>
            <tr>
              <th scope="col">Field</th>
              <th scope="col" className="figure">
                Default
              </th>
              <th scope="col">Source</th>
            </tr>
          </thead>
          <tbody>
            {methodDefaults().map(({ label, value, unit, source }) => (
              <tr key={label}>
                <th scope="row">{label}</th>
                <td className="figure">
                  {value} {unit}
                </td>
                <td>{source}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </ScrollInside>
    </section>
  );
}
