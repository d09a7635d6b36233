import { ChangeDetectionStrategy, Component, computed, inject, input, output, signal } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';
import { type CorrectiveAction } from '#shared/actions';
import { problemOf, problemWords } from '#ui/problem';
import { State } from '#ui/state';
import { Access } from '../contract/access';
import { momentShort } from '../pieces/dates';
import { FormTrouble } from '../pieces/form-trouble';
import { ActionsApi } from './actions-api';
import { ResolveDialog } from './resolve-dialog';

export interface Owner {
  readonly id: string;
  readonly name: string;
}

/** Corrective actions of a shift: who owns each, and its evidence. */
@Component({
  selector: 'kb-action-list',
  imports: [FormTrouble, State],
  template: `
    <kb-form-trouble [words]="refusal()" />
    <ul class="kb-rows" style="--kb-columns: 9.2rem minmax(0, 1fr) 13rem 6rem" aria-label="Corrective actions">
      @for (action of actions(); track action.id) {
        <li>
          <kb-state [kind]="action.resolvedAt ? 'done' : 'stop'">{{ action.resolvedAt ? 'Resolved' : 'Stopped' }}</kb-state>
          <span>
            <b>{{ action.taskName ? action.taskName + ': ' : '' }}{{ action.text }}</b>&ngsp;
            <span class="kb-quiet">{{ action.openedBy }}, {{ momentShort(action.openedAt) }}</span>
            @if (action.resolvedAt) {
              <br />{{ action.evidence }} <span class="kb-quiet">{{ action.resolvedBy }}, {{ momentShort(action.resolvedAt) }}</span>
            }
          </span>
          @if (!action.resolvedAt && mayAssign()) {
            <select class="kb-field" [attr.aria-label]="'Owner of: ' + action.text" (change)="assign(action, $any($event.target).value)">
              @if (!action.ownerPersonId) {
                <option value="" selected>nobody owns it</option>
              }
              @for (owner of owners(); track owner.id) {
                <option [value]="owner.id" [selected]="owner.id === action.ownerPersonId">{{ owner.name }}</option>
              }
            </select>
          } @else {
            <span class="kb-quiet">{{ action.ownerName ?? 'nobody owns it' }}</span>
          }
          @if (!action.resolvedAt && mayResolve()) {
            <span><button type="button" class="kb-link" [attr.aria-label]="'Resolve: ' + action.text" (click)="resolve(action)">Resolve</button></span>
          }
        </li>
      }
    </ul>
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ActionList {
  private readonly api = inject(ActionsApi);
  private readonly access = inject(Access);
  private readonly dialogs = inject(MatDialog);

  readonly actions = input.required<readonly CorrectiveAction[]>();
  /** Who can own one. */
  readonly owners = input<readonly Owner[]>([]);
  readonly changed = output<void>();

  protected readonly mayAssign = computed(() => this.access.may('assignAction') && this.owners().length > 0);
  protected readonly mayResolve = computed(() => this.access.may('resolveAction'));
  protected readonly refusal = signal('');
  protected readonly momentShort = momentShort;

  protected async assign(action: CorrectiveAction, ownerPersonId: string): Promise<void> {
    if (!ownerPersonId) return;
    this.refusal.set('');
    try {
      await firstValueFrom(this.api.assign(action, ownerPersonId));
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    }
    this.changed.emit();
  }

  protected async resolve(action: CorrectiveAction): Promise<void> {
    const resolved = await firstValueFrom(this.dialogs.open<ResolveDialog, CorrectiveAction, CorrectiveAction>(ResolveDialog, { data: action, width: '38rem', maxWidth: '96vw' }).afterClosed());
    if (resolved) this.changed.emit();
  }
}
