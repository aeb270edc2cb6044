import { parentPort } from 'node:worker_threads';
import type { VelocityModel } from '@eremite/shared/science/counterpart/velocity-term';
import { Engine, type Learnt } from '../../scoring/engine.ts';
import { packCandidates, packNeighbours, readCandidates, readNeighbours } from '../../scoring/evidence.ts';
import { unpackInput } from './packed-input.ts';
import type { PreviewedDetection, PreviewMessage, PreviewTask, SupposeTask } from './preview-messages.ts';
import { failureOf } from './thread-failure.ts';
import { whatIfDistances } from './what-if-distances.ts';

const port = parentPort!;
port.on('message', (task: PreviewTask | SupposeTask) => {
  let message: PreviewMessage;
  try {
    message = { kind: 'done', results: JSON.stringify('suppose' in task ? suppose(task) : score(task)) };
  } catch (error) {
    message = { kind: 'failed', ...failureOf(error) };
  }
  port.postMessage(message);
});

/** Scores the wanted detections one by one, as a run would that had these rows. */
function score({ wanted, ...task }: PreviewTask): PreviewedDetection[] {
  const { engine, tables } = prepare(task);
  return wanted.map(({ catalogueId, row }) => {
    const position = engine.detections.positionOf(catalogueId, row);
    const [scored] = engine.score(position, position + 1);
    const { detection } = scored!;
    return {
      item: scored!.item,
      detail: scored!.detail(),
      candidates: readCandidates(packCandidates(scored!.candidates, detection), tables),
      neighbours: readNeighbours(packNeighbours(scored!.neighbours, detection), tables),
    };
  });
}

/** Scores one detection as a run would at other distances. */
function suppose({ suppose: { catalogueId, row, distances }, ...task }: SupposeTask) {
  const { engine, tables } = prepare(task);
  return whatIfDistances(engine, engine.detections.positionOf(catalogueId, row), distances, tables);
}

function prepare({ input, learnt }: Pick<PreviewTask, 'input' | 'learnt'>) {
  const engine = new Engine(unpackInput(input));
  if (learnt) engine.setLearnt(applicable(learnt, engine));
  return { engine, tables: engine.input.catalogues.map(({ id, name, kind }) => ({ catalogueId: id, name, kind })) };
}

/** What an earlier run learnt, as far as the criteria want it learnt; what follows from the criteria stays theirs. */
function applicable({ relation, priors, velocity }: Learnt, { learnt, input }: Engine): Learnt {
  const { learnMagnitudes, learnPrior, learnVelocities } = input.criteria.counterpart;
  return {
    ...learnt,
    relation: learnMagnitudes ? relation : null,
    priors: learnPrior ? priors : [],
    velocity: learnVelocities ? withMeasured(learnt.velocity, velocity) : learnt.velocity,
  };
}

/** The velocity model of the criteria with what a run measured; the few tables read here would measure too little. */
function withMeasured(
  model: VelocityModel,
  { histogram, ringObjects, clusteredFraction }: VelocityModel,
): VelocityModel {
  const { histogram: _, ringObjects: __, ...base } = model;
  return {
    ...base,
    ...(histogram ? { histogram } : {}),
    ...(ringObjects ? { ringObjects, clusteredFraction } : {}),
  };
}
