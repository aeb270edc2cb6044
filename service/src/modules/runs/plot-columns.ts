import type { PlotPoint } from '@eremite/shared/contracts/plot';
import { number, probability, type TableColumn, text, whole } from '../../edition/columns/table-column.ts';

const dex = (
  name: string,
  unit: string,
  description: string,
  cell: TableColumn<PlotPoint>['cell'],
): TableColumn<PlotPoint> => number(name, unit, description, cell, { decimals: 3 });

/** The numbers behind the plots of a survey, for people and programs. */
export const PLOT_COLUMNS: TableColumn<PlotPoint>[] = [
  text('detection', 'Name in the HI list', (point) => point.name),
  text('starlight', 'Starlight verdict', (point) => point.starlight),
  text('surroundings', 'Surroundings verdict', (point) => point.surroundings),
  probability('p_no_starlight', 'P(none) + P(missed) + P(spurious)', (point) => point.pNoStarlight),
  probability('p_alone', 'P(no neighbour)', (point) => point.pAlone),
  dex('log_mhi', 'log(solMass)', 'HI mass', (point) => point.logHiMass),
  dex('e_log_mhi', 'log(solMass)', 'Its error from flux and distance', (point) => point.logHiMassError),
  dex('log_lr', 'log(solLum)', 'r luminosity of the counterpart or its limit', (point) => point.logLight),
  whole('l_lr', '1: the luminosity is an upper limit, ratios to it are lower limits', ({ lightIsLimit }) =>
    lightIsLimit ? 1 : 0,
  ),
  dex('log_mhi_lr', '', 'HI mass over r luminosity, solar units', (point) => point.logGasToLight),
  dex('e_log_mhi_lr', '', 'Its error from the flux; the distance drops out', (point) => point.logGasToLightError),
  dex('log_mbar', 'log(solMass)', 'Gas (1.33 M_HI) and stars; of the gas alone where the light is a limit', (point) => {
    return point.logBaryonicMass;
  }),
  dex('log_mbar_max', 'log(solMass)', 'With as many stars as the limit allows', (point) => point.logBaryonicMassUpTo),
  dex('log_vrot', 'log(km/s)', 'W50 / (2 sin i) at the median of random inclinations', (point) => point.logSpeed),
  dex('log_vrot_16', 'log(km/s)', '16th per cent over random inclinations', (point) => point.logSpeedLow),
  dex('log_vrot_84', 'log(km/s)', '84th per cent over random inclinations', (point) => point.logSpeedHigh),
];
