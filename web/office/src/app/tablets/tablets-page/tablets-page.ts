import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { firstValueFrom } from 'rxjs';
import { AddTablet, type PairingCode, type Tablet } from '#shared/tablets';
import { Empty } from '#ui/empty';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords } from '#ui/problem';
import { State, type StateKind } from '#ui/state';
import { Access } from '../../contract/access';
import { PagedList } from '../../contract/paged-list';
import { Confirmation } from '../../pieces/confirmation';
import { dayOf, heardAt, localDateOf, timeOf } from '../../pieces/dates';
import { TextField } from '../../pieces/fields/text-field';
import { FormSending } from '../../pieces/form-sending';
import { FormTrouble } from '../../pieces/form-trouble';
import { Unready } from '../../pieces/unready';
import { KeptAsideList } from '../kept-aside/kept-aside-list';
import { TabletsApi } from '../tablets-api';

/** Tablets that crews sign on: pair one by a code shown once, see when each was last heard, withdraw a lost one. */
@Component({
  selector: 'kb-tablets-page',
  imports: [Empty, FormTrouble, KeptAsideList, MatButton, Note, PageHeader, ReactiveFormsModule, State, TextField, Unready],
  templateUrl: './tablets-page.html',
  styleUrl: './tablets-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TabletsPage {
  private readonly api = inject(TabletsApi);
  private readonly access = inject(Access);
  private readonly confirmation = inject(Confirmation);

  protected readonly tablets = new PagedList(signal(null).asReadonly(), (_query: null, after) => this.api.list(after));
  protected readonly mayAdd = computed(() => this.access.may('addTablet'));
  protected readonly mayReadKeptAside = computed(() => this.access.may('listKeptAside'));
  protected readonly mayWithdraw = computed(() => this.access.may('withdrawTablet'));
  protected readonly form = inject(NonNullableFormBuilder).group({ name: '' });
  protected readonly sending = new FormSending(this.form);
  protected readonly isAdding = signal(false);
  protected readonly code = signal<PairingCode | null>(null);
  protected readonly codeUntil = computed(() => timeOf(this.code()?.expiresAt ?? new Date()));
  protected readonly refusal = signal('');

  protected state({ isPaired, withdrawnAt }: Tablet): { readonly kind: StateKind; readonly words: string } {
    if (withdrawnAt !== null) return { kind: 'plain', words: 'withdrawn' };
    return isPaired ? { kind: 'done', words: 'paired' } : { kind: 'caution', words: 'waits to be paired' };
  }

  protected heard({ lastHeardAt, withdrawnAt }: Tablet): string {
    if (withdrawnAt !== null) return `withdrawn ${dayOf(localDateOf(withdrawnAt))}`;
    return lastHeardAt === null ? 'never heard' : `last heard ${heardAt(lastHeardAt, new Date())}`;
  }

  protected async add(): Promise<void> {
    const code = await this.sending.send(AddTablet, ({ name }) => firstValueFrom(this.api.add(name)));
    if (!code) return;
    this.form.reset();
    this.isAdding.set(false);
    this.show(code);
  }

  protected renew(tablet: Tablet): Promise<void> {
    return this.call(async () => this.show(await firstValueFrom(this.api.renewCode(tablet.id))));
  }

  protected async withdraw(tablet: Tablet): Promise<void> {
    const isSure = await this.confirmation.ask({
      heading: `Withdraw ${tablet.name}?`,
      text: 'It can no longer read or send, and shows nothing of the organisation at its next contact. Signatures still on it and not sent are lost to us unless it is paired again first; everything received stays.',
      action: 'Withdraw tablet',
      isDanger: true,
    });
    if (isSure) await this.call(async () => this.put(await firstValueFrom(this.api.withdraw(tablet.id))));
  }

  private show(code: PairingCode): void {
    this.code.set(code);
    this.put(code.tablet);
  }

  private put(tablet: Tablet): void {
    this.tablets.items.update((tablets) => (tablets.some(({ id }) => id === tablet.id) ? tablets.map((other) => (other.id === tablet.id ? tablet : other)) : [tablet, ...tablets]));
  }

  private async call(run: () => Promise<void>): Promise<void> {
    this.refusal.set('');
    try {
      await run();
    } catch (error) {
      this.refusal.set(problemWords(problemOf(error)));
    }
  }
}
