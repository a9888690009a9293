import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import { Refusal } from './refusal';
import type { Schema } from './schema';

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/** Acts on the server. Answers are read by the schemas of the contract; what fails comes as a `Refusal`. */
@Injectable({ providedIn: 'root' })
export class Api {
  private readonly http = inject(HttpClient);

  /** Does something and reads the answer. */
  async send<T>(method: Method, path: string, answer: Schema<T>, body?: unknown): Promise<T> {
    const read = await this.request(method, path, body);
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

  private async request(method: Method, path: string, body: unknown): Promise<unknown> {
    try {
      return await firstValueFrom(this.http.request<unknown>(method, path, { body, responseType: 'json' }));
    } catch (error) {
      throw Refusal.of(error);
    }
  }
}
