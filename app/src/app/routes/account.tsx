import { Radio, RadioGroup, Switch } from '@blueprintjs/core';
import { useSuspenseQuery } from '@tanstack/react-query';
import { Panel } from '#components/panel/panel.tsx';
import { KeySettings } from '#features/account/components/key-settings.tsx';
import { PasswordForm } from '#features/account/components/password-form.tsx';
import { Tokens } from '#features/account/components/tokens.tsx';
import { setPreferences, usePreferences } from '#lib/preferences.ts';
import { meQuery } from '#lib/queries/me.ts';
import { useTitle } from '#lib/use-title.ts';

export function Component() {
  const { data: me } = useSuspenseQuery(meQuery());
  const { theme, shortcuts } = usePreferences();
  useTitle('Account');
  return (
    <main id="content" className="page page--narrow stack">
      <div>
        <h1>{me.name}</h1>
        <p className="page__lede mono small">{me.email}</p>
      </div>
      <Panel title="In this browser">
        <RadioGroup
          label="Theme"
          inline
          selectedValue={theme}
          onChange={(event) => setPreferences({ theme: event.currentTarget.value === 'light' ? 'light' : 'dark' })}
        >
          <Radio label="Dark" value="dark" />
          <Radio label="Light" value="light" />
        </RadioGroup>
        <Switch
          checked={shortcuts}
          label="Single-key commands on the detection page"
          onChange={(event) => setPreferences({ shortcuts: event.target.checked })}
        />
        {shortcuts && <KeySettings />}
      </Panel>
      <Panel title="Password">
        <PasswordForm />
      </Panel>
      <Panel title="Tokens for scripts">
        <Tokens />
      </Panel>
    </main>
  );
}
