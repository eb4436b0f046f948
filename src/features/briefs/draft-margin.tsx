import type { BriefVersionRecord } from '../../contract/briefs.ts';
import { briefDifference } from '../../engine/brief/brief-difference.ts';
import { plural } from '../../lib/format.ts';
import { Button } from '../../ui/button.tsx';
import { ChangeList } from './change-list.tsx';
import type { DraftReading } from './draft.ts';
import { EffectPanel } from './effect-panel.tsx';
import type { DraftEffect } from './use-effect-of-draft.ts';

interface DraftMarginProps {
  readonly record: BriefVersionRecord;
  readonly reading: DraftReading;
  readonly effect: DraftEffect;
  readonly mayChange: boolean;
  readonly isSaving: boolean;
  readonly onUndo: () => void;
}

/** Beside the form: the effect on an example year, what changed against the saved version, and Save. */
export function DraftMargin({ record, reading, effect, mayChange, isSaving, onUndo }: DraftMarginProps) {
  const { body: saved } = record;
  const draft = reading.ok ? reading.brief : null;
  const changes = draft === null ? null : briefDifference(saved, draft);
  const faults = reading.ok ? 0 : Object.keys(reading.problems).length;
  return (
    <>
      <EffectPanel
        stations={record.stations}
        savedVersion={record.version.version}
        effect={effect}
        hasFaults={!reading.ok}
      />
      {mayChange ? (
        <div className="grid gap-2">
          <div className="flex flex-wrap items-center gap-2">
            <Button type="submit" look="primary" busy={isSaving} disabled={changes?.length === 0}>
              Save version {record.newest + 1}
            </Button>
            <Button onClick={onUndo} disabled={changes?.length === 0}>
              Undo changes
            </Button>
          </div>
          <p role="status" className="text-fine text-soft">
            {changes === null
              ? `${plural(faults, 'fault')} to mend before it can be saved.`
              : changes.length === 0
                ? 'Nothing is changed yet.'
                : `${plural(changes.length, 'field')} changed against version ${record.version.version}.`}
          </p>
          {changes !== null && changes.length > 0 ? (
            <div className="max-lg:hidden">
              <ChangeList changes={changes} label="Changes of the draft" />
            </div>
          ) : null}
        </div>
      ) : (
        <p className="text-soft">A planner, an engineer or a lead of the team changes briefs.</p>
      )}
    </>
  );
}
