import { HttpClient, HttpErrorResponse } from '@angular/common/http';
import { Injectable, inject, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { preferUnit, useUnits, type Quantity, type Unit } from '../pieces/units';
import { type ChangePassword, Session, type SignIn } from '#shared/session';

/** Who is signed in here. The only place that knows the session's addresses. */
@Injectable({ providedIn: 'root' })
export class SessionApi {
  private readonly http = inject(HttpClient);
  private readonly current = signal<Session | null>(null);
  private isKnown = false;

  /** The signed-in person, role and organisation; null before sign-in and after sign-out. */
  readonly session = this.current.asReadonly();

  /** Asks the server once who is signed in. Rejects when the server cannot be reached. */
  async load(): Promise<Session | null> {
    if (this.isKnown) return this.current();
    try {
      this.keep(Session.parse(await firstValueFrom(this.http.get('/api/session'))));
    } catch (error) {
      if (!(error instanceof HttpErrorResponse) || error.status !== 401) throw error;
      this.keep(null);
    }
    return this.current();
  }

  async signIn(request: SignIn): Promise<Session> {
    const session = Session.parse(await firstValueFrom(this.http.post('/api/session', request)));
    this.keep(session);
    return session;
  }

  async signOut(): Promise<void> {
    await firstValueFrom(this.http.delete('/api/session'));
    this.keep(null);
  }

  async changePassword(request: ChangePassword): Promise<void> {
    await firstValueFrom(this.http.put('/api/session/password', request));
  }

  /** The server said the session is over. */
  forget(): void {
    this.keep(null);
  }

  /** The same on every machine. A figure is stored in SI whatever becomes of this, so a failure is no trouble of the person's. */
  async keepUnit(quantity: Quantity, unit: Unit): Promise<void> {
    if (!preferUnit(quantity, unit) || this.current() === null) return;
    await firstValueFrom(this.http.put('/api/session/unit', { quantity, unit: unit.id })).catch((error: unknown) => console.warn('the unit is kept on this page only', error));
  }

  private keep(session: Session | null): void {
    this.current.set(session);
    useUnits(session?.units ?? {});
    this.isKnown = true;
  }
}
