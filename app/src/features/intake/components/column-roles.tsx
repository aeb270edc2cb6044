import { HTMLSelect, InputGroup } from '@blueprintjs/core';
import '#components/data-table/data-table.css';
import type { Intake } from '@eremite/shared/contracts/intake';
import type { IntakeSettings } from '@eremite/shared/contracts/intake-settings';
import { useMemo } from 'react';
import { assign, readAssignment, takesUnit, withUnit, writeAssignment } from '../hooks/column-assignment.ts';
import type { Change } from '../hooks/use-intake-draft.ts';
import { Confidence } from './confidence.tsx';
import { MAGNITUDE_ROLES, ROLE_WORDS } from './role-words.ts';
import { UnitCell } from './unit-cell.tsx';

interface ColumnRolesProps {
  intake: Intake;
  draft: IntakeSettings;
  change: Change;
}

/** Every column with its first values and what it is taken for. */
export function ColumnRoles({ intake, draft, change }: ColumnRolesProps) {
  const assignment = useMemo(() => readAssignment(intake.columns, draft), [intake.columns, draft]);
  const set = (column: string, role: string | null) =>
    change({
      columns: writeAssignment(assign(assignment, column, role)),
      // The unit belonged to the column that had the role before.
      ...(role && draft.units?.[role] !== undefined ? { units: withUnit(draft.units, role, undefined) } : {}),
    });
  return (
    <div
      className="data-table__scroll column-roles"
      tabIndex={0}
      role="region"
      aria-label="Columns and their roles"
      data-pointer="/columns"
    >
      <table className="data-table">
        <thead>
          <tr>
            <th scope="col" className="is-left">
              Column
            </th>
            <th scope="col" className="is-left">
              Unit
            </th>
            <th scope="col" className="is-left">
              First values
            </th>
            <th scope="col" className="is-left">
              Taken for
            </th>
            <th scope="col" className="is-left">
              Guess
            </th>
          </tr>
        </thead>
        <tbody>
          {intake.columns.map((column, at) => {
            const role = assignment[column.name] ?? null;
            return (
              <tr key={column.name} className={role ? undefined : 'is-quiet'}>
                <td className="is-left" title={[column.description, column.ucd].filter(Boolean).join(' · ')}>
                  {column.name}
                </td>
                <td className="is-left" data-pointer={role ? `/units/${role}` : undefined}>
                  {role && takesUnit(role) ? (
                    <UnitCell
                      key={`${role} ${draft.units?.[role] ?? ''}`}
                      column={column.name}
                      stated={column.unit}
                      given={draft.units?.[role]}
                      onChange={(unit) => change({ units: withUnit(draft.units, role, unit) })}
                    />
                  ) : (
                    (column.unit ?? '')
                  )}
                </td>
                <td className="is-left column-roles__values">{firstValues(intake.preview, at)}</td>
                <td className="is-left">
                  <RoleSelect column={column.name} role={role} onChange={(next) => set(column.name, next)} />
                </td>
                <td className="is-left">
                  {column.guess && role === column.guess ? (
                    <Confidence value={column.confidence} />
                  ) : role ? (
                    <span className="prose">yours</span>
                  ) : (
                    ''
                  )}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}

const firstValues = (preview: readonly (readonly string[])[], at: number) =>
  preview
    .slice(0, 3)
    .map((row) => row[at] || '–')
    .join('  ');

function RoleSelect({
  column,
  role,
  onChange,
}: {
  column: string;
  role: string | null;
  onChange: (role: string | null) => void;
}) {
  const [base = '', band] = role?.split(':') ?? [];
  const ofBand = base in MAGNITUDE_ROLES;
  return (
    <span className="row" style={{ flexWrap: 'nowrap' }}>
      <HTMLSelect
        aria-label={`Role of ${column}`}
        value={base}
        onChange={(event) => {
          const next = event.target.value;
          onChange(next === '' ? null : next in MAGNITUDE_ROLES ? `${next}:${band ?? 'r'}` : next);
        }}
      >
        <option value="">kept, no role</option>
        {Object.entries({ ...ROLE_WORDS, ...MAGNITUDE_ROLES }).map(([key, words]) => (
          <option key={key} value={key}>
            {words}
          </option>
        ))}
      </HTMLSelect>
      {ofBand && (
        <InputGroup
          aria-label={`Band of ${column}`}
          style={{ width: 62 }}
          maxLength={20}
          defaultValue={band}
          onBlur={(event) =>
            event.target.value.trim() &&
            event.target.value.trim() !== band &&
            onChange(`${base}:${event.target.value.trim()}`)
          }
        />
      )}
    </span>
  );
}
