import { Button, Menu, MenuItem, Popover } from '@blueprintjs/core';
import { savePng, saveText } from '#lib/save-picture.ts';

/** Saves a picture that a function draws as SVG. @param fileName without ending */
export const SaveMenu = ({ draw, fileName, label }: { draw: () => string; fileName: string; label: string }) => (
  <Popover
    placement="bottom-end"
    shouldReturnFocusOnClose
    content={
      <Menu size="small">
        <MenuItem text="SVG" onClick={() => saveText(draw(), `${fileName}.svg`, 'image/svg+xml')} />
        <MenuItem text="PNG" onClick={() => void savePng(draw(), `${fileName}.png`)} />
      </Menu>
    }
  >
    <Button size="small" text="save" aria-label={label} />
  </Popover>
);
