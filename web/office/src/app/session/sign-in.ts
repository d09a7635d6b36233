import { ChangeDetectionStrategy, Component, DestroyRef, computed, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatError, MatFormField, MatLabel } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router } from '@angular/router';
import { SignIn as SignInRequest } from '#shared/session';
import { BrandMark } from '#ui/brand-mark';
import { fieldMessage, parseForm } from '#ui/form-schema';
import { Note } from '#ui/note';
import { problemOf, problemWords } from '#ui/problem';
import { SessionApi } from './session-api';

/** E-mail address and password; every refusal says what to do next. */
@Component({
  selector: 'kb-sign-in',
  imports: [BrandMark, MatButton, MatError, MatFormField, MatInput, MatLabel, Note, ReactiveFormsModule],
  templateUrl: './sign-in.html',
  styleUrl: './sign-in.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignIn {
  private readonly api = inject(SessionApi);
  private readonly router = inject(Router);

  /** Where the person wanted to go, from the address. */
  readonly returnPath = input<string | undefined>();

  protected readonly form = inject(NonNullableFormBuilder).group({ email: '', password: '' });
  protected readonly fieldMessage = fieldMessage;
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');
  protected readonly waitSeconds = signal(0);
  protected readonly waitWords = computed(() => {
    const seconds = this.waitSeconds();
    return seconds >= 90 ? `${Math.ceil(seconds / 60)} minutes` : `${seconds} ${seconds === 1 ? 'second' : 'seconds'}`;
  });

  private timer: ReturnType<typeof setInterval> | undefined;

  constructor() {
    inject(DestroyRef).onDestroy(() => clearInterval(this.timer));
    // Already signed in (a second tab, the way back after an outage): straight on.
    this.api.load().then(
      (session) => session && this.goOn(),
      (error: unknown) => this.refusal.set(problemWords(problemOf(error))),
    );
  }

  protected async signIn(): Promise<void> {
    if (this.isSending() || this.waitSeconds() > 0) return;
    const request = parseForm(this.form, SignInRequest);
    if (!request) return;
    this.isSending.set(true);
    this.refusal.set('');
    try {
      await this.api.signIn(request);
      await this.goOn();
    } catch (error) {
      this.refuse(error);
    } finally {
      this.isSending.set(false);
    }
  }

  private refuse(error: unknown): void {
    const problem = problemOf(error);
    if (problem.status === 401) {
      this.refusal.set('E-mail address or password is wrong. Try again, or ask the owner to set a new password.');
      this.form.controls.password.reset();
    } else if (problem.status === 429) {
      this.wait(problem.retryAfterSeconds ?? 60);
    } else {
      this.refusal.set(problemWords(problem));
    }
  }

  private wait(seconds: number): void {
    this.waitSeconds.set(Math.max(1, Math.ceil(seconds)));
    clearInterval(this.timer);
    this.timer = setInterval(() => {
      this.waitSeconds.update((left) => Math.max(0, left - 1));
      if (this.waitSeconds() === 0) clearInterval(this.timer);
    }, 1000);
  }

  /** Only paths of this application: an address from elsewhere is not followed. */
  private goOn(): Promise<boolean> {
    const path = this.returnPath() ?? '/';
    return this.router.navigateByUrl(/^\/(?![/\\])/.test(path) ? path : '/');
  }
}
