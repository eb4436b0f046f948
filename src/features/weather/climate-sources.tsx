import { useRef, useState } from 'react';
import type { HumidityRule, MonthlyChange } from '../../engine/climate/monthly-change.ts';
import { type MonthlyChangeFault, readMonthlyChange } from '../../engine/climate/read-monthly-change.ts';
import { number } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { Notice } from '../../ui/notice.tsx';
import { type ClimateDraft, draftOf } from './climate-draft.ts';
import { tableFaultWords } from './climate-words.ts';

/** Twelve lines are small; a weather file that was chosen by mistake is not read. */
const MOST_BYTES = 100_000;
const EXAMPLE_K = 2;

interface SourcesProps {
  readonly humidityRule: HumidityRule;
  readonly onDraft: (draft: ClimateDraft) => void;
}

interface TableProblem {
  readonly fileName: string;
  readonly faults: readonly MonthlyChangeFault[];
}

/** A table of monthly changes from a file, or a made-up example to begin from. */
export function ClimateSources({ humidityRule, onDraft }: SourcesProps) {
  const input = useRef<HTMLInputElement>(null);
  const [problem, setProblem] = useState<TableProblem | null>(null);
  const take = async (file: File) => {
    const reading = await readTable(file);
    setProblem(reading.ok ? null : { fileName: file.name, faults: reading.faults });
    if (reading.ok) onDraft(draftOf(reading.monthly, { hasRatioChange: reading.hasRatioChange, humidityRule }));
  };
  return (
    <>
      <input
        ref={input}
        type="file"
        accept=".csv,.txt,.tsv,text/*"
        hidden
        aria-label="Table of monthly changes"
        onChange={(event) => {
          const [file] = event.currentTarget.files ?? [];
          event.currentTarget.value = '';
          if (file) void take(file);
        }}
      />
      <div className="flex flex-wrap items-center gap-2">
        <Button onClick={() => input.current?.click()}>Read a table</Button>
        <Button
          onClick={() => {
            setProblem(null);
            onDraft(draftOf(exampleChanges, { hasRatioChange: false, humidityRule }));
          }}
        >
          Example: +{number(EXAMPLE_K)}&nbsp;K in every month
        </Button>
      </div>
      <p className="mt-2 max-w-[60ch] text-fine text-soft">
        A table has a line for each month, its columns named month, shift_K, max_shift_K, min_shift_K, ratio_change_pct;
        the last three may be left out. The example is made up and no projection.
      </p>
      {problem === null ? null : (
        <div className="mt-3">
          <Notice tone="wrong" live title={`${problem.fileName} cannot be used. Mend the file, then read it again.`}>
            <ul>
              {problem.faults.map((fault) => (
                <li key={`${fault.line} ${fault.column} ${fault.message}`}>{tableFaultWords(fault)}</li>
              ))}
            </ul>
          </Notice>
        </div>
      )}
    </>
  );
}

const exampleChanges: readonly MonthlyChange[] = Array.from({ length: 12 }, () => ({
  shiftK: EXAMPLE_K,
  maxShiftK: EXAMPLE_K,
  minShiftK: EXAMPLE_K,
  ratioChangePct: 0,
}));

async function readTable(file: File) {
  if (file.size <= MOST_BYTES) return readMonthlyChange(await file.text());
  const message = 'The file is too large for a table of twelve lines.';
  return { ok: false, faults: [{ line: null, column: null, message }] } as const;
}
