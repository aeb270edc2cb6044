import { Injectable, Logger } from '@nestjs/common';
import type { Database } from '../database/database.ts';

export interface FinishingRun {
  readonly id: string;
  readonly surveyId: string;
  readonly number: number;
  /** Who started it. */
  readonly actor: { readonly id: string; readonly name: string };
}
type Published = (surveyId: string, catalogueId: string) => Promise<void>;
type Starting = (surveyId: string) => Promise<void>;
type Finishing = (run: FinishingRun, tx: Database) => Promise<void>;

/** Where one feature lets another act at a turn of a survey's life, without knowing of it. Listeners are added at start. */
@Injectable()
export class SurveyHooks {
  readonly #log = new Logger(SurveyHooks.name);
  readonly #published: Published[] = [];
  readonly #starting: Starting[] = [];
  readonly #finishing: Finishing[] = [];

  /** After a table has been published, outside its transaction. */
  onPublished(listener: Published): void {
    this.#published.push(listener);
  }
  /** Before a run fixes its inputs. */
  onRunStarting(listener: Starting): void {
    this.#starting.push(listener);
  }
  /** In the transaction that makes a run's results visible. */
  onRunFinishing(listener: Finishing): void {
    this.#finishing.push(listener);
  }

  async published(surveyId: string, catalogueId: string): Promise<void> {
    // What is published stays published, whatever others make of it; they look again when a run starts.
    for (const listener of this.#published) {
      await listener(surveyId, catalogueId).catch((error: unknown) =>
        this.#log.error({ err: error }, 'after publishing'),
      );
    }
  }
  async runStarting(surveyId: string): Promise<void> {
    for (const listener of this.#starting) await listener(surveyId);
  }
  async runFinishing(run: FinishingRun, tx: Database): Promise<void> {
    for (const listener of this.#finishing) await listener(run, tx);
  }
}
