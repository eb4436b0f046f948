import type { BriefChange, BriefVersionRecord } from '../../contract/briefs.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import type { DraftProblems } from './draft.ts';
import { EffectPanel } from './effect-panel.tsx';
import { FaultList } from './fault-list.tsx';
import type { DraftEffect } from './use-effect-of-draft.ts';

interface DraftMarginProps {
  readonly record: BriefVersionRecord;
  /** Against the saved version; null while the draft has faults. */
  readonly changes: readonly BriefChange[] | null;
  readonly problems: DraftProblems;
  readonly effect: DraftEffect;
  readonly mayChange: boolean;
  readonly isSaving: boolean;
  readonly onUndo: () => void;
}

/** Beside the form: the score on an example year, Save, and what holds it back. */
export function DraftMargin({ record, changes, problems, effect, mayChange, isSaving, onUndo }: DraftMarginProps) {
  const { version, newest, stations } = record;
  const faults = Object.keys(problems).length;
  const isSame = changes !== null && changes.length === 0;
  return (
    <>
      <EffectPanel stations={stations} savedVersion={version.version} effect={effect} />
      {mayChange ? (
        <div className="grid gap-1.5">
          <div className="flex flex-wrap items-center gap-x-3 gap-y-1.5">
            <Button type="submit" look="primary" busy={isSaving} disabled={isSame}>
              Save version {newest + 1}
            </Button>
            <Button onClick={onUndo} disabled={isSame}>
              Undo changes
            </Button>
            <p role="status" className="text-fine text-soft">
              {changes === null
                ? `${plural(faults, 'fault')} to mend before it can be saved. The effect shown is that of the last state without one.`
                : isSame
                  ? 'Nothing is changed yet.'
                  : `${plural(changes.length, 'field')} changed against version ${version.version}.`}
            </p>
          </div>
          <FaultList problems={problems} />
        </div>
      ) : (
        <p className="text-soft">A planner, an engineer or a lead of the team changes briefs.</p>
      )}
    </>
  );
}
