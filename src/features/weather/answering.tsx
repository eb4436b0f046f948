import { useState } from 'react';
import type { WeatherFileRecord } from '../../contract/weather.ts';
import type { FileAnswers } from '../../contract/weather-reading.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Notice } from '../../ui/notice.tsx';
import { AnswerForm } from './answer-form.tsx';
import { Correcting } from './correcting.tsx';
import { mayChangeWeather } from './weather-words.ts';

/** What a file asks, as a form for those who may answer, and corrections while it waits; afterwards, what follows from the answer. */
export function Answering({ record }: { record: WeatherFileRecord }) {
  const { role } = useTeam();
  const { file, asks, table } = record;
  const [answered, setAnswered] = useState<{ fileId: string; answers: FileAnswers } | null>(null);
  const own = answered?.fileId === file.id ? answered.answers : null;
  const isAsking = file.status === 'asks' && mayChangeWeather(role);
  const isCorrectable = (file.status === 'review' || file.status === 'refused') && file.parent === null;
  // Other questions are another form; the same ones keep what has been typed.
  const key = JSON.stringify([file.id, asks, table?.shapeKey]);
  return (
    <>
      {own !== null && file.status !== 'reading' ? <AnsweredNotice status={file.status} answers={own} /> : null}
      {isAsking ? (
        <section aria-labelledby="answering" className="border-y border-line py-4">
          <h2 id="answering" className="mb-3 text-name">
            Answer what the file asks
          </h2>
          <AnswerForm key={key} record={record} onAnswered={(answers) => setAnswered({ fileId: file.id, answers })} />
        </section>
      ) : null}
      {isCorrectable && mayChangeWeather(role) ? (
        <Correcting key={file.id} record={record} onAnswered={(answers) => setAnswered({ fileId: file.id, answers })} />
      ) : null}
    </>
  );
}

type Status = WeatherFileRecord['file']['status'];

function AnsweredNotice({ status, answers }: { status: Status; answers: FileAnswers }) {
  const others = answers.mapping
    ? ' Other files of the same shape that waited for this answer are read by it too, and the next ones will not ask.'
    : '';
  const own =
    status === 'asks' ? 'The file was read with your answer and asks more.' : 'The file was read with your answer.';
  return (
    <Notice live>
      {own}
      {others}
    </Notice>
  );
}
