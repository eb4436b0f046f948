import type { WeatherFile } from '../../contract/weather.ts';
import { StatusMark } from '../../ui/status-mark.tsx';
import { statusWords } from './weather-words.ts';

const allSteps = ['received', 'reading', 'reducing', 'storing'] as const;
/** A refused file is not reduced, and nothing of it but its findings is stored. */
const refusedSteps = ['received', 'reading'] as const;

/** The road of a file from arrival to its status, with how far it has come. */
export function ReadingSteps({ file }: { file: WeatherFile }) {
  const steps = file.status === 'refused' ? refusedSteps : allSteps;
  const isEnded = file.status !== 'reading';
  const at = file.step === null ? 0 : allSteps.indexOf(file.step);
  return (
    <ol className="flex flex-wrap items-center gap-x-2.5 text-fine" aria-label="Steps of reading">
      {steps.map((step, index) => {
        const isDone = isEnded || index < at;
        const isNow = !isEnded && index === at && file.failure === null;
        return (
          <li
            key={step}
            aria-current={isNow ? 'step' : undefined}
            className={isNow ? 'font-semibold text-ink' : isDone ? 'text-ink' : 'text-soft'}
          >
            <span aria-hidden="true">{isDone ? '✓ ' : isNow ? '› ' : '· '}</span>
            {step}
            <span className="sr-only">{isDone ? ', done' : isNow ? ', now' : ', to come'}</span>
          </li>
        );
      })}
      <li className={`flex items-center gap-1.5 ${isEnded || file.failure ? 'font-semibold' : 'text-soft'}`}>
        {isEnded || file.failure ? (
          <>
            <StatusMark status={file.status} failed={file.failure !== null} />
            {statusWords(file)}
          </>
        ) : (
          '· review'
        )}
      </li>
    </ol>
  );
}
