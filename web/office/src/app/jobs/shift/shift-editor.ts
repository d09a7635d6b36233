import { computed, DestroyRef, inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { type EquipmentFacts, type PersonFacts } from '#compliance/facts';
import { type Problem } from '#shared/common';
import { type Equipment } from '#shared/equipment';
import { assembleFacts, Shift, type ShiftPlan } from '#shared/jobs';
import { type Person } from '#shared/people';
import { problemOf } from '#ui/problem';
import { JobsApi } from '../jobs-api';
import { ANSWER_SHIFT } from './live-answer';

/** saved: as on the server; waiting: typed, not sent yet; failed: tried in vain; conflict: somebody else saved first. */
export type SaveState = 'saved' | 'waiting' | 'saving' | 'failed' | 'conflict';

const restMilliseconds = 700;

/** One shift being planned: the plan as it stands on the page, its live answer, and its way to the server. */
@Injectable()
export class ShiftEditor {
  private readonly api = inject(JobsApi);
  private readonly answerShift = inject(ANSWER_SHIFT);

  /** The shift as the server last gave it. */
  readonly shift = signal<Shift | null>(null);
  readonly plan = signal<ShiftPlan | null>(null);
  readonly saveState = signal<SaveState>('saved');
  readonly savedAt = signal<Date | null>(null);
  /** Why loading or saving failed. */
  readonly problem = signal<Problem | null>(null);
  /** With a conflict: the shift as somebody else left it. */
  readonly theirs = signal<Shift | null>(null);
  readonly knownPeople = signal<readonly Person[]>([]);
  readonly knownEquipment = signal<readonly Equipment[]>([]);

  /** People and machines just put on the shift count at once, before the server has answered with their facts. */
  private readonly context = computed<Shift['context'] | null>(() => {
    const context = this.shift()?.context;
    if (!context) return null;
    const people = new Map<string, PersonFacts>(this.knownPeople().map((person) => [person.id, factsOf(person)]));
    const equipment = new Map<string, EquipmentFacts>(this.knownEquipment().map((machine) => [machine.id, machine]));
    for (const person of context.people) people.set(person.id, person);
    for (const machine of context.equipment) equipment.set(machine.id, machine);
    return { ...context, people: [...people.values()], equipment: [...equipment.values()] };
  });
  readonly facts = computed(() => {
    const [shift, plan, context] = [this.shift(), this.plan(), this.context()];
    return shift && plan && context ? assembleFacts({ date: shift.date, job: shift.job, plan, context }) : null;
  });
  /** What the rules say of the plan as it stands now, saved or not. */
  readonly answer = computed(() => {
    const facts = this.facts();
    return facts ? this.answerShift(facts, this.asOf) : null;
  });
  readonly isUnsaved = computed(() => this.saveState() !== 'saved');
  readonly hasUnpublishedChanges = computed(() => this.isUnsaved() || (this.shift()?.hasUnpublishedChanges ?? false));

  private readonly asOf = new Date().toISOString();
  private timer: ReturnType<typeof setTimeout> | undefined;
  private sending: Promise<boolean> | null = null;

  constructor() {
    const tryAgain = () => this.saveState() === 'failed' && void this.flush();
    window.addEventListener('online', tryAgain);
    inject(DestroyRef).onDestroy(() => {
      clearTimeout(this.timer);
      window.removeEventListener('online', tryAgain);
    });
  }

  async load(shiftId: string): Promise<void> {
    this.problem.set(null);
    try {
      this.take(await firstValueFrom(this.api.shift(shiftId)));
    } catch (error) {
      this.problem.set(problemOf(error));
    }
  }

  /** Takes what the server says now. What was typed meanwhile stays on the page and goes its own way to the server. */
  take(shift: Shift): void {
    this.shift.set(shift);
    if (this.isUnsaved()) return;
    this.plan.set(shift.plan);
  }

  change(edit: (plan: ShiftPlan) => ShiftPlan, { atOnce = false } = {}): void {
    const plan = this.plan();
    if (!plan) return;
    const next = edit(plan);
    if (next === plan) return;
    this.plan.set(next);
    if (this.saveState() === 'conflict') return;
    this.saveState.set('waiting');
    clearTimeout(this.timer);
    this.timer = setTimeout(() => void this.flush(), atOnce ? 0 : restMilliseconds);
  }

  /** Sends what is not saved yet; resolves to whether everything is on the server. */
  async flush(): Promise<boolean> {
    clearTimeout(this.timer);
    // One save at a time, because each needs the version the last one made; another caller may have begun the next one meanwhile.
    while (this.sending) await this.sending;
    if (this.saveState() === 'saved') return true;
    if (this.saveState() === 'conflict') return false;
    this.sending = this.send();
    const isSaved = await this.sending;
    this.sending = null;
    return isSaved && this.isUnsaved() ? this.flush() : isSaved;
  }

  /** Saves this page's plan over the one somebody else made. */
  keepMine(): Promise<boolean> {
    const theirs = this.theirs();
    if (theirs) this.shift.set(theirs);
    this.theirs.set(null);
    this.saveState.set('waiting');
    return this.flush();
  }

  takeTheirs(): void {
    const theirs = this.theirs();
    this.theirs.set(null);
    this.saveState.set('saved');
    if (theirs) this.take(theirs);
  }

  private async send(): Promise<boolean> {
    const [shift, plan] = [this.shift(), this.plan()];
    if (!shift || !plan) return false;
    this.saveState.set('saving');
    try {
      const saved = await firstValueFrom(this.api.editPlan(shift.id, plan, shift.version));
      this.shift.set(saved);
      this.problem.set(null);
      this.savedAt.set(new Date());
      this.saveState.set(this.plan() === plan ? 'saved' : 'waiting');
      return true;
    } catch (error) {
      const problem = problemOf(error);
      const current = Shift.safeParse(problem.current);
      this.problem.set(problem);
      this.theirs.set(current.success ? current.data : null);
      this.saveState.set(current.success ? 'conflict' : 'failed');
      return false;
    }
  }
}

/** A person as the rules see one; work elsewhere is only known to the server and comes with its answer. */
function factsOf({ id, name, language, employer, isAdultConfirmed, isKeptFromIsocyanates, silicaTrainedOn, silicaTrainedBy, hazcomTrainedOn, hazcomTrainedBy, respirators }: Person): PersonFacts {
  return { id, name, language, isLead: false, employer, isAdultConfirmed, isKeptFromIsocyanates, silicaTrainedOn, silicaTrainedBy: silicaTrainedBy ?? null, hazcomTrainedOn, hazcomTrainedBy: hazcomTrainedBy ?? null, respirators, elsewhere: [] };
}
