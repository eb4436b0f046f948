import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { type RuleOff, type Station, setRuleOff, setRuleOn } from '../../contract/stations.ts';
import { type RuleName, ruleNames } from '../../engine/weather-files/quality/quality-options.ts';
import { call } from '../../lib/api-client.ts';
import { errorSentence } from '../../lib/api-error.ts';
import { moment, sentence } from '../../lib/format.ts';
import { useTeam } from '../../lib/team-scope.ts';
import { Button } from '../../ui/button.tsx';
import { ReasonDialog } from '../../ui/reason-dialog.tsx';
import { ruleWords } from './rule-words.ts';
import { useStationChanged } from './station-queries.ts';

interface StationRulesProps {
  readonly station: Station;
  readonly rulesOff: readonly RuleOff[];
  readonly mayChange: boolean;
}

/** The rules that files of this station are held against, and those that are switched off with the reason. */
export function StationRules({ station, rulesOff, mayChange }: StationRulesProps) {
  const [asked, setAsked] = useState<RuleName | null>(null);
  return (
    <section aria-labelledby="rules">
      <h2 id="rules" className="text-name">
        Rules for its files
      </h2>
      <p className="mt-0.5 mb-2 max-w-[70ch] text-soft">
        {rulesOff.length === 0 ? 'Every rule holds here. ' : ''}A rule that is switched off is not held against files
        that are read from then on.
      </p>
      <ul className="border-b border-line">
        {ruleNames.map((rule) => (
          <Rule
            key={rule}
            station={station}
            rule={rule}
            off={rulesOff.find((each) => each.rule === rule) ?? null}
            mayChange={mayChange}
            onSwitchOff={() => setAsked(rule)}
          />
        ))}
      </ul>
      {asked ? <SwitchOffDialog station={station} rule={asked} onClose={() => setAsked(null)} /> : null}
    </section>
  );
}

interface RuleProps {
  readonly station: Station;
  readonly rule: RuleName;
  readonly off: RuleOff | null;
  readonly mayChange: boolean;
  readonly onSwitchOff: () => void;
}

function Rule({ station, rule, off, mayChange, onSwitchOff }: RuleProps) {
  const { teamId } = useTeam();
  const changed = useStationChanged();
  const { title, meaning } = ruleWords[rule];
  const switchOn = useMutation({
    mutationFn: () => call(setRuleOn, { params: { teamId, stationId: station.id, rule }, query: {} }),
    onSettled: changed,
  });
  return (
    <li className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-t border-line py-1.5">
      <div className="min-w-0 max-w-[70ch]">
        <p>
          <span className={off ? 'font-semibold' : ''}>{title}</span>
          <span className="text-soft">, {meaning}</span>
        </p>
        {off ? (
          <p className="text-fine">
            Switched off by {off.setBy} on {moment(off.setAt)}: {sentence(off.reason)}
          </p>
        ) : null}
        {switchOn.isError ? (
          <p role="alert" className="text-fine text-madder">
            {errorSentence(switchOn.error)}
          </p>
        ) : null}
      </div>
      {!mayChange ? (
        <span className="text-soft">{off ? 'Off' : 'Holds'}</span>
      ) : off ? (
        <Button
          look="quiet"
          aria-label={`Let it hold again: ${title}`}
          busy={switchOn.isPending}
          onClick={() => switchOn.mutate()}
        >
          Let it hold again
        </Button>
      ) : (
        <Button look="quiet" aria-label={`Switch off: ${title}`} onClick={onSwitchOff}>
          Switch off
        </Button>
      )}
    </li>
  );
}

function SwitchOffDialog({ station, rule, onClose }: { station: Station; rule: RuleName; onClose: () => void }) {
  const { teamId } = useTeam();
  const changed = useStationChanged();
  const switchOff = useMutation({
    mutationFn: (reason: string) =>
      call(setRuleOff, { params: { teamId, stationId: station.id, rule }, query: {}, body: { reason } }),
    onSuccess: onClose,
    onSettled: changed,
  });
  return (
    <ReasonDialog
      title={`Switch off: ${ruleWords[rule].title}`}
      hint="Kept with your name."
      leave="Leave it on"
      act="Switch the rule off"
      isBusy={switchOff.isPending}
      error={switchOff.error}
      onClose={onClose}
      onReason={(reason) => switchOff.mutate(reason)}
    >
      Files of {station.name} that are read from now on are not held against {ruleWords[rule].meaning}. What was read
      before is not changed.
    </ReasonDialog>
  );
}
