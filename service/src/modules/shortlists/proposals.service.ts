import type { ShortlistProposal, ShortlistRule } from '@eremite/shared/contracts/shortlist';
import type { VerdictItem } from '@eremite/shared/contracts/verdict';
import { DOUBT_GRADES } from '@eremite/shared/contracts/words';
import { Injectable } from '@nestjs/common';
import { AccessService } from '../../common/access.ts';
import { AppError } from '../../common/app-error.ts';
import type { SignedInUser } from '../../common/signed-in-user.ts';
import { observabilityOf } from '../../edition/observability/observability-of.ts';
import { byPriority, priorityOf } from '../../edition/priority-of.ts';
import { RunsService } from '../runs/runs.service.ts';
import { VerdictsService } from '../runs/verdicts.service.ts';
import { notReady } from './not-ready.ts';
import { ShortlistsRepository } from './shortlists.repository.ts';

/** Refusals listed: enough to see what is missing, however many there are. */
const MOST_REFUSED = 500;

/** Picks settled detections by a rule and ranks them; changes nothing. */
@Injectable()
export class ProposalsService {
  constructor(
    private readonly shortlists: ShortlistsRepository,
    private readonly runs: RunsService,
    private readonly verdicts: VerdictsService,
    private readonly access: AccessService,
  ) {}

  async propose(user: SignedInUser, surveyId: string, rule: ShortlistRule): Promise<ShortlistProposal> {
    await this.access.survey(user, surveyId, 'read');
    const run = await this.runs.finished(user, rule.runId);
    if (run.surveyId !== surveyId) throw new AppError('NOT_FOUND', 'There is no such run in this survey.');
    const settled = await this.shortlists.settled({ runId: rule.runId });
    const words = new Map(settled.map((row) => [row.detectionId, row]));
    const isOn = new Set((await this.shortlists.entries(surveyId)).map((entry) => entry.detectionId));
    const ready = settled.filter((row) => notReady(row) === null && fitsWords(row, rule)).map((row) => row.detectionId);
    const fit = [...(await this.verdicts.items(rule.runId, ready)).values()].filter((item) => fitsNumbers(item, rule));
    const hours = hoursOf(fit, rule);
    const most = Math.max(0, ...hours.values());
    const entries = fit
      .map((item) => {
        const own = hours.get(item.detectionId) ?? null;
        const visibility = own === null ? null : most > 0 ? own / most : 0;
        const priority = priorityOf(item, visibility);
        const { detectionId, name } = item;
        return { detectionId, name, reason: reasonOf(item, own), priority, hours: own, isOn: isOn.has(detectionId) };
      })
      .sort(byPriority)
      .slice(0, rule.limit);
    const { starlight, surroundings, minPNone } = rule;
    const computed = await this.verdicts.page(
      rule.runId,
      { starlight, surroundings, minPNone },
      { limit: MOST_REFUSED, sort: '-pNone' },
    );
    const refused = computed.items
      .filter((item) => fitsNumbers(item, rule))
      .flatMap(({ detectionId, name }) => {
        const why = notReady(words.get(detectionId));
        return why === null ? [] : [{ detectionId, name, why }];
      });
    return { runNumber: run.number, entries, refused };
  }
}

function fitsWords(row: { starlight: string; surroundings: string }, rule: ShortlistRule): boolean {
  return (
    (rule.starlight as string[]).includes(row.starlight) && (rule.surroundings as string[]).includes(row.surroundings)
  );
}

function fitsNumbers(item: VerdictItem, rule: ShortlistRule): boolean {
  const { stability } = priorityOf(item);
  const worst = Math.max(
    0,
    ...item.doubts.map(({ grade }) => (grade === 'not testable here' ? 0 : DOUBT_GRADES.indexOf(grade))),
  );
  return (
    item.pNone >= rule.minPNone &&
    (item.pAlone ?? 0) >= rule.minPAlone &&
    (stability ?? 0) >= rule.minStability &&
    worst <= DOUBT_GRADES.indexOf(rule.worstDoubt)
  );
}

function hoursOf(items: readonly VerdictItem[], { observe }: ShortlistRule): Map<string, number> {
  if (!observe) return new Map();
  return new Map(observabilityOf(items, observe).items.map(({ detectionId, hours }) => [detectionId, hours]));
}

/** What speaks for it, in the figures it is ranked by. */
function reasonOf(item: VerdictItem, hours: number | null): string {
  const { stability } = priorityOf(item);
  const parts = [
    `P(none) ${item.pNone.toFixed(2)}`,
    item.pAlone === null ? 'P(no neighbour) not known' : `P(no neighbour) ${item.pAlone.toFixed(2)}`,
    stability === null ? 'stability not drawn' : `stands in ${Math.round(stability * 100)} per cent of draws`,
    ...(item.doubts.length > 0 ? [item.doubts.map(({ name, grade }) => `${name}: ${grade}`).join(', ')] : []),
    ...(hours === null ? [] : [`${hours} dark hours`]),
  ];
  return `${parts.join('; ')}.`;
}
