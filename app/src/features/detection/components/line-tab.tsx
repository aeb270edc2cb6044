import type { CriteriaSettings } from '@eremite/shared/contracts/criteria';
import type { LineMeasurement, Observation } from '@eremite/shared/contracts/observation';
import type { VerdictDetail } from '@eremite/shared/contracts/verdict';
import { toOpticalCz } from '@eremite/shared/science/velocity/conventions';
import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { Loading } from '#components/feedback/loading.tsx';
import { ProblemCallout } from '#components/feedback/problem-callout.tsx';
import { fixed, NO_VALUE, significant, withError } from '#lib/format/number.ts';
import { channelsQuery, observationsQuery } from '../api/observations.ts';
import { AddObservations } from './add-observations.tsx';
import { ObservationFacts } from './observation-facts.tsx';
import { SpectrumPlot } from './spectrum-plot.tsx';
import './images.css';

interface LineTabProps {
  detail: VerdictDetail;
  settings: CriteriaSettings | undefined;
  mayAdd: boolean;
}

type SpectrumObservation = Observation & { spectrum: NonNullable<Observation['spectrum']> };
const isSpectrum = (item: Observation): item is SpectrumObservation => item.spectrum !== null;

/** The HI line of a detection as spectra have it, measured and held against the table. */
export function LineTab({ detail, settings, mayAdd }: LineTabProps) {
  const id = detail.verdict.detectionId;
  const { data, error, isPending } = useQuery(observationsQuery(id));
  const spectra = data?.items.filter(isSpectrum) ?? [];
  return (
    <section className="stack">
      <ProblemCallout error={error} />
      {isPending && <Loading what="Reading the spectra" />}
      {data && spectra.length === 0 && (
        <p className="muted">
          No spectrum of this detection was uploaded. A table or a FITS array of velocity or frequency against flux
          density is drawn and measured here.
        </p>
      )}
      {spectra.map((item) => (
        <OneSpectrum key={item.id} item={item} detail={detail} settings={settings} />
      ))}
      {mayAdd && (
        <AddObservations detectionId={id} what="spectra" accept=".csv,.txt,.dat,.xml,.vot,.fits,.fit,.fts,.gz" />
      )}
    </section>
  );
}

interface OneSpectrumProps extends Pick<LineTabProps, 'detail' | 'settings'> {
  item: SpectrumObservation;
}

function OneSpectrum({ item, detail, settings }: OneSpectrumProps) {
  const { data, error } = useQuery(channelsQuery(item.id));
  const { spectrum } = item;
  const { velocityKms, width50Kms } = detail.verdict;
  const neighbours = detail.neighbours.flatMap(({ name, velocityKms: kms }) => (kms === null ? [] : [{ name, kms }]));
  const interference = (settings?.doubts.interference ?? []).map(({ name, lowMhz, highMhz }) => ({
    name,
    lowKms: toOpticalCz('frequency', highMhz),
    highKms: toOpticalCz('frequency', lowMhz),
  }));
  return (
    <article className="observation">
      <ProblemCallout error={error} />
      {data && (
        <SpectrumPlot
          channels={data}
          facts={spectrum}
          table={{ velocityKms, width50Kms }}
          neighbours={neighbours}
          interference={interference}
        />
      )}
      {data && (
        <p className="small muted">
          The baseline is taken off. Above: velocity and W50 of the table, and marks of neighbours. The line drawn
          through is the adopted fit; the flux is summed over the shaded channels.
        </p>
      )}
      {spectrum.measurement && <Measurement line={spectrum.measurement} detail={detail} unit={spectrum.unit} />}
      {spectrum.notes.map((note) => (
        <p key={note} className="small muted">
          {note}
        </p>
      ))}
      <ObservationFacts item={item} />
    </article>
  );
}

interface MeasurementProps {
  line: LineMeasurement;
  detail: VerdictDetail;
  unit: string;
}

function Measurement({ line, detail: { verdict }, unit }: MeasurementProps) {
  const isFlux = unit === 'mJy';
  // mJy km/s of the channels, Jy km/s of the table.
  const scale = isFlux ? 1e-3 : 1;
  const rows: [what: ReactNode, measured: string, table: string, unit: string][] = [
    ['Velocity', withError(line.centreKms.value, line.centreKms.error, 0), fixed(verdict.velocityKms, 0), 'km/s'],
    ['W50', withError(line.w50Kms.value, line.w50Kms.error, 0), fixed(verdict.width50Kms, 0), 'km/s'],
    ['W20', withError(line.w20Kms.value, line.w20Kms.error, 0), NO_VALUE, 'km/s'],
    [
      'Flux',
      withError(line.flux.value * scale, line.flux.error * scale, 2),
      isFlux ? fixed(verdict.fluxJyKms, 2) : NO_VALUE,
      isFlux ? 'Jy km/s' : 'K km/s',
    ],
    ['Peak over noise', fixed(line.peakSignalToNoise, 1), NO_VALUE, ''],
    ['Flux over noise', fixed(line.signalToNoise, 1), fixed(verdict.signalToNoise, 1), ''],
    ['Asymmetry', withError(line.asymmetry.value, line.asymmetry.error, 2), NO_VALUE, 'upper − lower half'],
    ['Noise of a channel', significant(line.noise, 2), NO_VALUE, `${unit} at ${fixed(line.channelKms, 1)} km/s`],
  ];
  return (
    <div className="line-measurement">
      <table className="line-table">
        <caption className="visually-hidden">What was measured of the line, and what the table says</caption>
        <thead>
          <tr>
            <th scope="col">Line</th>
            <th scope="col">measured</th>
            <th scope="col">table</th>
            <th scope="col">unit</th>
          </tr>
        </thead>
        <tbody>
          {rows.map(([what, measured, table, of]) => (
            <tr key={String(what)}>
              <th scope="row">{what}</th>
              <td className="num">{measured}</td>
              <td className="num">{table}</td>
              <td className="muted">{of}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="small">{peakWords(line)}</p>
    </div>
  );
}

/** Whether one peak or two, and how sure. */
function peakWords({ peaks, lnBayesFactor, troughDepth, correlation }: LineMeasurement): string {
  const evidence = `ln of the Bayes factor for two peaks ${fixed(lnBayesFactor, 1)}, from information criteria`;
  const said = {
    one: 'One peak',
    two: `Two peaks, the trough ${fixed(100 * troughDepth, 0)} % below the lower one`,
    'cannot tell': 'One peak or two cannot be told',
  }[peaks];
  const noise =
    correlation > 0 ? ` Neighbouring channels are correlated (${fixed(correlation, 2)}), which is allowed for.` : '';
  return `${said}: ${evidence}.${noise} Errors are from 100 noise realisations of the fit.`;
}
