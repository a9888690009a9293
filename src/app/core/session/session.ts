import { Injectable, computed, inject, signal } from '@angular/core';
import { Router } from '@angular/router';
import { signedInSchema, type SignIn, type SignedIn } from '../../../../shared/contracts/api';
import { Api, Refusal } from '../api';

/** Who is signed in. The session itself is a cookie that no script can read. */
@Injectable({ providedIn: 'root' })
export class Session {
  private readonly api = inject(Api);
  private readonly router = inject(Router);
  private readonly current = signal<SignedIn | null>(null);
  private restored: Promise<void> | undefined;

  readonly person = this.current.asReadonly();
  readonly isAdministrator = computed(() => this.current()?.role === 'administrator');
  readonly mayCreateProducts = computed(() => this.current()?.mayCreateProducts === true);

  /** Finds out once whether the browser holds a session. A server that does not answer is asked again next time. */
  async restore(): Promise<SignedIn | null> {
    this.restored ??= this.ask();
    try {
      await this.restored;
    } catch (error) {
      this.restored = undefined;
      throw error;
    }
    return this.current();
  }

  async signIn(credentials: SignIn): Promise<void> {
    this.enter(await this.api.send('POST', '/api/session', signedInSchema, credentials));
  }

  /** Takes over a person whom an act has signed in, such as the acceptance of an invitation. */
  enter(person: SignedIn): void {
    this.restored = Promise.resolve();
    this.current.set(person);
  }

  async signOut(): Promise<void> {
    await this.api.act('DELETE', '/api/session');
    await this.leave();
  }

  async signOutEverywhere(): Promise<void> {
    await this.api.act('DELETE', '/api/session/all');
    await this.leave();
  }

  /** The server no longer knows the session: sign in again, then come back to where it happened. */
  async expire(): Promise<void> {
    if (this.current() === null) return;
    this.current.set(null);
    await this.router.navigate(['/sign-in'], { queryParams: { then: this.router.url, expired: '1' } });
  }

  private async ask(): Promise<void> {
    try {
      this.current.set(await this.api.send('GET', '/api/session', signedInSchema));
    } catch (error) {
      if (!(error instanceof Refusal) || error.status !== 401) throw error;
      this.current.set(null);
    }
  }

  private async leave(): Promise<void> {
    this.current.set(null);
    await this.router.navigate(['/sign-in']);
  }
}
