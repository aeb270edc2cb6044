import { Button, Checkbox, NumericInput, Popover } from '@blueprintjs/core';
import type { PanelLayer } from './panel-layer.ts';
import { EVERYTHING, setSkySettings, type SkySettings } from './sky-settings.ts';

interface SkyControlsProps {
  layers: readonly PanelLayer[];
  settings: SkySettings;
}

const isDefault = ({ hidden, faintestMag, windowKms, withoutVelocity }: SkySettings) =>
  hidden.length === 0 && faintestMag === null && windowKms === null && withoutVelocity;

/** Which tables and which objects the panel shows. */
export const SkyControls = (props: SkyControlsProps) => (
  <Popover placement="bottom-end" content={<Choices {...props} />} shouldReturnFocusOnClose>
    <Button size="small" text={isDefault(props.settings) ? 'layers' : 'layers ●'} aria-label="Layers and filters" />
  </Popover>
);

function Choices({ layers, settings }: SkyControlsProps) {
  const { hidden, faintestMag, windowKms, withoutVelocity } = settings;
  const kinds = [...new Set(layers.map(({ kind }) => kind))];
  const toggle = (ids: readonly string[], shown: boolean) =>
    setSkySettings({ hidden: [...hidden.filter((id) => !ids.includes(id)), ...(shown ? [] : ids)] });
  return (
    <div className="sky-choices">
      {kinds.map((kind) => {
        const ofKind = layers.filter((layer) => layer.kind === kind);
        const ids = ofKind.map(({ catalogueId }) => catalogueId);
        const shown = ids.filter((id) => !hidden.includes(id)).length;
        return (
          <fieldset key={kind}>
            <legend className="visually-hidden">{kind === 'hi' ? 'gas' : kind}</legend>
            <Checkbox
              checked={shown === ids.length}
              indeterminate={shown > 0 && shown < ids.length}
              onChange={(event) => toggle(ids, event.currentTarget.checked)}
            >
              <b>{kind === 'hi' ? 'gas' : kind}</b>
            </Checkbox>
            {ofKind.map(({ catalogueId, name, objects }) => (
              <Checkbox
                key={catalogueId}
                className="sky-choices__table"
                checked={!hidden.includes(catalogueId)}
                onChange={(event) => toggle([catalogueId], event.currentTarget.checked)}
              >
                {name} <span className="num muted">{objects}</span>
              </Checkbox>
            ))}
          </fieldset>
        );
      })}
      <Limit
        label="Not fainter than"
        unit="mag"
        value={faintestMag}
        step={0.5}
        onChange={(value) => setSkySettings({ faintestMag: value })}
      />
      <Limit
        label="Velocity difference at most"
        unit="km/s"
        value={windowKms}
        step={100}
        onChange={(value) => setSkySettings({ windowKms: value })}
      />
      <Checkbox
        checked={withoutVelocity}
        label="Objects without a velocity"
        onChange={(event) => setSkySettings({ withoutVelocity: event.currentTarget.checked })}
      />
      <Button size="small" text="Show everything" onClick={() => setSkySettings(EVERYTHING)} />
    </div>
  );
}

interface LimitProps {
  label: string;
  unit: string;
  value: number | null;
  step: number;
  onChange: (value: number | null) => void;
}

/** A number that may be left empty for no limit. */
const Limit = ({ label, unit, value, step, onChange }: LimitProps) => (
  <label className="sky-choices__limit">
    <span>
      {label} <span className="muted">{unit}</span>
    </span>
    <NumericInput
      size="small"
      min={0}
      buttonPosition="none"
      stepSize={step}
      majorStepSize={step * 4}
      minorStepSize={null}
      placeholder="no limit"
      defaultValue={value ?? ''}
      onValueChange={(number, text) => onChange(text.trim() === '' || Number.isNaN(number) ? null : number)}
    />
  </label>
);
