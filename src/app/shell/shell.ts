import type { ElementRef } from '@angular/core';
import { DOCUMENT, ChangeDetectionStrategy, Component, computed, inject, viewChild } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import {
  NavigationEnd,
  NavigationError,
  NavigationStart,
  Router,
  RouterLink,
  RouterLinkActive,
  RouterOutlet,
} from '@angular/router';
import { filter, map } from 'rxjs';
import { Page } from '../core/page';
import { Session } from '../core/session';
import { pageShortcuts } from '../core/shortcuts';
import { ThemeChoice } from '../core/theme';
import { Logo } from '../ui/figures';
import { Failed, type Failure } from '../ui/states';
import { NoticeBar } from './notice-bar';
import { PersonMenu } from './person-menu';
import { ShortcutHelp } from './shortcut-help';

@Component({
  selector: 'app-shell',
  imports: [Failed, Logo, NoticeBar, PersonMenu, RouterLink, RouterLinkActive, RouterOutlet, ShortcutHelp],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  private readonly router = inject(Router);
  private readonly document = inject(DOCUMENT);
  private readonly main = viewChild.required<ElementRef<HTMLElement>>('main');
  private readonly help = viewChild.required(ShortcutHelp);

  protected readonly session = inject(Session);
  protected readonly trail = inject(Page).trail;

  /** A page that could not be fetched at all: shown instead of leaving the click without effect. */
  protected readonly broken = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationError || event instanceof NavigationStart),
      map((event): { url: string; failure: Failure } | undefined =>
        event instanceof NavigationError
          ? {
              url: event.url,
              failure: {
                kind: 'unreachable',
                title: 'The page could not be opened',
                detail: 'The server does not answer, or a newer version was installed. Try again.',
              },
            }
          : undefined,
      ),
    ),
  );
  protected readonly showsTrail = computed(() => this.session.person() !== null && this.trail().length > 0);

  private path = '';

  constructor() {
    inject(ThemeChoice);
    this.router.events
      .pipe(
        filter((event) => event instanceof NavigationEnd),
        takeUntilDestroyed(),
      )
      .subscribe((event) => this.focusPage(event.urlAfterRedirects));
    pageShortcuts([
      { keys: '?', what: 'Show the shortcuts', act: () => this.help().open() },
      { keys: 'g p', what: 'Go to products', act: () => void this.router.navigateByUrl('/products') },
      { keys: 'g a', what: 'Go to your account', act: () => void this.router.navigateByUrl('/account') },
      { keys: 'g u', what: 'Go to people', act: () => void this.router.navigateByUrl('/people') },
    ]);
  }

  protected skipToPage(event: Event): void {
    event.preventDefault();
    this.main().nativeElement.focus();
  }

  protected openAgain(url: string): void {
    this.document.location.assign(url);
  }

  protected showShortcuts(): void {
    this.help().open();
  }

  /** A new page starts at its top for the keyboard as well; a new order of the same page does not. */
  private focusPage(url: string): void {
    const path = url.split(/[?#]/, 1)[0];
    const first = this.path === '';
    const same = this.path === path;
    this.path = path;
    if (!first && !same) this.main().nativeElement.focus({ preventScroll: true });
  }
}
