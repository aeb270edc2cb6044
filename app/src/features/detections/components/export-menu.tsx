import { Button, Menu, MenuItem, Popover } from '@blueprintjs/core';
import { API_BASE } from '#config/paths.ts';

const LISTS = [
  { path: 'verdicts', text: 'Verdicts' },
  { path: 'candidates', text: 'Candidates' },
  { path: 'neighbours', text: 'Neighbours' },
] as const;

/** Downloads of a whole run, as the service writes them. */
export function ExportMenu({ runId }: { runId: string }) {
  return (
    <Popover
      placement="bottom-end"
      minimal
      content={
        <Menu>
          {LISTS.flatMap(({ path, text }) =>
            (['csv', 'votable'] as const).map((format) => (
              <MenuItem
                key={path + format}
                text={`${text} as ${format === 'csv' ? 'CSV' : 'VOTable'}`}
                href={`${API_BASE}/runs/${runId}/${path}?format=${format}`}
                download
              />
            )),
          )}
        </Menu>
      }
    >
      <Button text="Export" />
    </Popover>
  );
}
