import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { firstValueFrom, fromEvent, takeUntil } from 'rxjs';
import { Refusal } from './refusal';
import type { Schema } from './schema';

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** Acts on the server. Answers are read by the schemas of the contract; what fails comes as a `Refusal`. */
@Injectable({ providedIn: 'root' })
export class Api {
  private readonly http = inject(HttpClient);

  /** Does something and reads the answer. Where `until` is aborted before it came, the request ends and fails. */
  async send<T>(
    method: Method,
    path: string,
    answer: Schema<T>,
    body?: unknown,
    until?: AbortSignal,
  ): Promise<T> {
    const read = await this.request(method, path, body, until);
    try {
      return answer.parse(read);
    } catch (error) {
      throw Refusal.of(error);
    }
  }

  /** Does something whose answer is not needed. */
  async act(method: Method, path: string, body?: unknown): Promise<void> {
    await this.request(method, path, body);
  }

  private async request(method: Method, path: string, body: unknown, until?: AbortSignal): Promise<unknown> {
    try {
      const answer = this.http.request<unknown>(method, path, { body, responseType: 'json' });
      return await firstValueFrom(
        until === undefined ? answer : answer.pipe(takeUntil(fromEvent(until, 'abort'))),
      );
    } catch (error) {
      throw Refusal.of(error);
    }
  }
}
