import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { render, screen } from '@testing-library/angular';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { SignInPage } from './sign-in';

@Component({
  template: 'the page that was asked for',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
class Asked {}

async function openSignIn() {
  await render('<router-outlet />', {
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      provideRouter([
        { path: 'sign-in', component: SignInPage },
        { path: '**', component: Asked },
      ]),
    ],
  });
  await TestBed.inject(Router).navigateByUrl('/sign-in?then=/products/7%3Fsort%3Dreserve');
  await screen.findByRole('heading', { name: 'Sign in' });
  return TestBed.inject(HttpTestingController);
}

async function enter(email: string, password: string): Promise<void> {
  if (email !== '') await userEvent.type(screen.getByRole('textbox', { name: 'E-mail address' }), email);
  if (password !== '') await userEvent.type(screen.getByLabelText('Password'), password);
  await userEvent.click(screen.getByRole('button', { name: 'Sign in' }));
}

describe('SignInPage', () => {
  it('says what is missing and asks nothing of the server', async () => {
    const http = await openSignIn();
    await enter('ada@hebewerk.example', '');
    expect(await screen.findByText('Password is missing.')).toBeTruthy();
    http.expectNone('/api/session');
  });

  it('does not say which of both was wrong', async () => {
    const http = await openSignIn();
    await enter('ada@hebewerk.example', 'not the password');
    const request = await vi.waitFor(() => http.expectOne({ method: 'POST', url: '/api/session' }));
    request.flush('', { status: 401, statusText: 'Unauthorized' });
    expect((await screen.findByRole('alert')).textContent).toContain('E-mail address or password is wrong.');
  });

  it('leads back to the page that was asked for', async () => {
    const http = await openSignIn();
    await enter('Ada@Hebewerk.example', 'correct horse battery');
    const request = await vi.waitFor(() => http.expectOne({ method: 'POST', url: '/api/session' }));
    expect(request.request.body).toEqual({
      email: 'ada@hebewerk.example',
      password: 'correct horse battery',
    });
    request.flush({
      id: '5f2b3a1e-7f7f-4a53-9d1b-0c5a2f4e9a01',
      name: 'Ada Brandt',
      email: 'ada@hebewerk.example',
      role: 'member',
      mayCreateProducts: false,
    });
    expect(await screen.findByText('the page that was asked for')).toBeTruthy();
    expect(TestBed.inject(Router).url).toBe('/products/7?sort=reserve');
  });
});
