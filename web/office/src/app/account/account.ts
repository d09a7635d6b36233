import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatHint, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router } from '@angular/router';
import { roleNames } from '#shared/common';
import { ChangePassword } from '#shared/session';
import { fieldMessage, parseForm } from '#ui/form-schema';
import { Note } from '#ui/note';
import { PageHeader } from '#ui/page-header';
import { problemOf, problemWords, showFieldProblems } from '#ui/problem';
import { SessionApi } from '../session/session-api';

/** The signed-in person's own page: role, organisation, password, sign out. */
@Component({
  selector: 'kb-account',
  imports: [MatButton, MatError, MatFormField, MatHint, MatInput, MatLabel, Note, PageHeader, ReactiveFormsModule],
  templateUrl: './account.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Account {
  private readonly api = inject(SessionApi);
  private readonly router = inject(Router);

  protected readonly session = this.api.session;
  protected readonly roleName = computed(() => {
    const session = this.session();
    return session ? roleNames[session.role] : '';
  });
  protected readonly form = inject(NonNullableFormBuilder).group({ current: '', next: '' });
  protected readonly fieldMessage = fieldMessage;
  protected readonly isSending = signal(false);
  protected readonly isChanged = signal(false);
  protected readonly refusal = signal('');

  protected async changePassword(): Promise<void> {
    if (this.isSending()) return;
    this.isChanged.set(false);
    this.refusal.set('');
    const request = parseForm(this.form, ChangePassword);
    if (!request) return;
    this.isSending.set(true);
    try {
      await this.api.changePassword(request);
      this.form.reset();
      this.isChanged.set(true);
    } catch (error) {
      const problem = problemOf(error);
      const left = showFieldProblems(this.form, problem);
      if (left.length > 0) this.refusal.set(left.join(' '));
      else if (!problem.errors?.length) this.refusal.set(problemWords(problem));
    } finally {
      this.isSending.set(false);
    }
  }

  protected async signOut(): Promise<void> {
    try {
      await this.api.signOut();
      await this.router.navigateByUrl('/sign-in');
    } catch (error) {
      this.refusal.set(`Still signed in. ${problemWords(problemOf(error))}`);
    }
  }
}
