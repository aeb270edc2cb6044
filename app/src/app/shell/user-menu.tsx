import { Button, Menu, MenuDivider, MenuItem, Popover } from '@blueprintjs/core';
import type { Me } from '@eremite/shared/contracts/auth';
import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { paths } from '#config/paths.ts';
import { act } from '#lib/api-client.ts';
import { setPreferences, usePreferences } from '#lib/preferences.ts';

const initials = (name: string) =>
  name
    .split(/\s+/)
    .map((part) => part[0] ?? '')
    .join('')
    .slice(0, 2)
    .toLowerCase();

export function UserMenu({ me }: { me: Me }) {
  const { theme } = usePreferences();
  const navigate = useNavigate();
  const client = useQueryClient();
  const other = theme === 'dark' ? 'light' : 'dark';
  const signOut = async () => {
    await act('/auth/sign-out', { method: 'POST' }).catch(() => undefined);
    client.clear();
    await navigate(paths.signIn());
  };
  return (
    <Popover
      placement="bottom-end"
      minimal
      content={
        <Menu>
          <MenuDivider title={`${me.name} · ${me.email}`} />
          <MenuItem text="Methods" onClick={() => navigate(paths.methods())} />
          <MenuItem text="Account" onClick={() => navigate(paths.account())} />
          {me.isAdministrator && <MenuItem text="Administration" onClick={() => navigate(paths.administration())} />}
          <MenuItem text={`Use the ${other} theme`} onClick={() => setPreferences({ theme: other })} />
          <MenuDivider />
          <MenuItem text="Sign out" onClick={() => void signOut()} />
        </Menu>
      }
    >
      <Button className="who" aria-label={`${initials(me.name)}: menu of ${me.name}`} text={initials(me.name)} />
    </Popover>
  );
}
