import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import {
  type Account,
  confirmTwoFactor,
  endTwoFactor,
  getAccount,
  renewRecoveryCodes,
  startTwoFactor,
} from '../../contract/own-account.ts';
import { call } from '../../lib/api-client.ts';
import { apiKey } from '../../lib/api-query.ts';
import { plural } from '../../lib/format.ts';
import { issuesOf } from '../../lib/issues-of.ts';
import { Button } from '../../ui/button.tsx';
import { CopyButton } from '../../ui/copy-button.tsx';
import { FieldsForm } from '../../ui/fields-form.tsx';
import { Notice } from '../../ui/notice.tsx';
import { AccountSection } from './account-section.tsx';

const password = {
  name: 'password',
  label: 'Your password',
  type: 'password',
  autoComplete: 'current-password',
} as const;

/** A code of an authenticator beside the password, and what opens the account when the authenticator is lost. */
export function TwoFactorSection({ twoFactor }: { twoFactor: Account['twoFactor'] }) {
  const client = useQueryClient();
  const [codes, setCodes] = useState<readonly string[]>([]);
  const refresh = () => client.invalidateQueries({ queryKey: apiKey(getAccount) });
  const show = (made: { recoveryCodes: readonly string[] }) => {
    setCodes(made.recoveryCodes);
    refresh();
  };
  return (
    <AccountSection
      title="Two-factor sign-in"
      intro={
        twoFactor.on
          ? `On: signing in asks for a code of your authenticator. ${plural(twoFactor.recoveryCodesLeft, 'recovery code')} left.`
          : 'Off. With it, signing in asks for a code of an authenticator on your telephone as well, so that a password alone opens nothing.'
      }
    >
      {codes.length > 0 ? <RecoveryCodes codes={codes} /> : null}
      {twoFactor.on ? <TurnOff onCodes={show} onEnd={refresh} /> : <TurnOn onCodes={show} />}
    </AccountSection>
  );
}

function TurnOn({ onCodes }: { onCodes: (made: { recoveryCodes: readonly string[] }) => void }) {
  const [made, setMade] = useState<{ secret: string; uri: string } | null>(null);
  if (made === null) {
    return (
      <FieldsForm
        fields={[password]}
        check={(body) => issuesOf(startTwoFactor.body.schema, body)}
        send={(body) => call(startTwoFactor, { params: {}, query: {}, body })}
        onDone={setMade}
        act="Set up an authenticator"
      />
    );
  }
  return (
    <>
      <p>
        Type this key into your authenticator, or <a href={made.uri}>open it there</a> if it is on this device:
      </p>
      <p className="flex flex-wrap items-center gap-3">
        <code className="break-all">{made.secret.replace(/(.{4})(?=.)/g, '$1 ')}</code>
        <CopyButton text={made.secret} what="the key" />
      </p>
      <FieldsForm
        fields={[
          {
            name: 'code',
            label: 'Code that it shows now',
            autoComplete: 'one-time-code',
            inputMode: 'numeric',
            hint: 'Six figures.',
          },
        ]}
        check={(body) => issuesOf(confirmTwoFactor.body.schema, body)}
        send={(body) => call(confirmTwoFactor, { params: {}, query: {}, body })}
        onDone={onCodes}
        act="Begin two-factor sign-in"
      />
    </>
  );
}

interface TurnOffProps {
  readonly onCodes: (made: { recoveryCodes: readonly string[] }) => void;
  readonly onEnd: () => void;
}

function TurnOff({ onCodes, onEnd }: TurnOffProps) {
  const [asked, setAsked] = useState<'codes' | 'end' | null>(null);
  if (asked === null) {
    return (
      <div className="flex flex-wrap gap-2">
        <Button onClick={() => setAsked('codes')}>New recovery codes</Button>
        <Button onClick={() => setAsked('end')}>End two-factor sign-in</Button>
      </div>
    );
  }
  if (asked === 'end') {
    return (
      <FieldsForm
        fields={[password]}
        check={(body) => issuesOf(endTwoFactor.body.schema, body)}
        send={(body) => call(endTwoFactor, { params: {}, query: {}, body })}
        onDone={onEnd}
        act="End two-factor sign-in"
      />
    );
  }
  return (
    <FieldsForm
      fields={[password]}
      check={(body) => issuesOf(renewRecoveryCodes.body.schema, body)}
      send={(body) => call(renewRecoveryCodes, { params: {}, query: {}, body })}
      onDone={(made) => {
        setAsked(null);
        onCodes(made);
      }}
      act="Make new recovery codes"
    />
  );
}

function RecoveryCodes({ codes }: { codes: readonly string[] }) {
  return (
    <Notice tone="attention" live title="Your recovery codes, shown this once">
      <p>Each opens your account once, when the authenticator is lost. Keep them where you keep other keys.</p>
      <ul className="my-2 columns-2 max-sm:columns-1">
        {codes.map((code) => (
          <li key={code}>
            <code>{code}</code>
          </li>
        ))}
      </ul>
      <CopyButton text={codes.join('\n')} what="the recovery codes" />
    </Notice>
  );
}
