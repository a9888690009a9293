import { ChangeDetectionStrategy, Component } from '@angular/core';
import { outgoingMailSchema, type OutgoingMail } from '../../../../shared/contracts/api';
import { listOf, loaded } from '../../core/api';
import { pageHead } from '../../core/page';
import { MomentView } from '../../core/words';
import { Empty, WhenLoaded } from '../../ui/states';

const STATE_WORDS: Record<OutgoingMail['state'], string> = {
  waiting: 'Waiting',
  sent: 'Sent',
  failed: 'Could not be sent',
};

/** The mail that the product sends, so that an invitation can be handed over where no mail server is set up. */
@Component({
  selector: 'app-outgoing-mail',
  imports: [Empty, MomentView, WhenLoaded],
  template: `
    <div class="page-head"><h1>Outgoing mail</h1></div>
    <div class="sheet" *appWhenLoaded="mails; let mails; let renewing = renewing" [class.renewing]="renewing">
      @if (mails.length === 0) {
        <app-empty title="No mail yet">Invitations that you send appear here with their links.</app-empty>
      }
      @for (mail of mails; track mail.id) {
        <details>
          <summary>
            <span class="subject">{{ mail.subject }}</span>
            <span class="second to">to {{ mail.to }}</span>
            <span class="state">{{ words[mail.state] }}</span>
            <span class="second"><app-moment [at]="mail.at" /></span>
          </summary>
          <pre>{{ mail.text }}</pre>
        </details>
      }
    </div>
  `,
  styles: `
    details + details {
      border-top: 1px solid var(--rule-light);
    }
    summary {
      display: grid;
      grid-template-columns: minmax(0, 2fr) minmax(0, 2fr) 9rem 7rem;
      gap: 0.25rem 1rem;
      padding: 0.625rem 1.25rem;
      cursor: pointer;
    }
    summary:hover {
      background: var(--rule-light);
    }
    .subject::before {
      content: '';
      display: inline-block;
      margin-right: 0.625rem;
      border: 4px solid transparent;
      border-left: 6px solid var(--ink-second);
      border-right: 0;
    }
    [open] .subject::before {
      transform: rotate(90deg);
    }
    .subject {
      font-weight: 600;
    }
    pre {
      margin: 0;
      padding: 0.25rem 1.25rem 1rem;
      font: inherit;
      white-space: pre-wrap;
      overflow-wrap: anywhere;
    }
    @media (max-width: 40rem) {
      summary {
        grid-template-columns: minmax(0, 1fr) auto;
        padding-inline: 1rem;
      }
      .to {
        grid-column: 1 / -1;
        grid-row: 2;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OutgoingMailPage {
  protected readonly mails = loaded(() => '/api/mail', listOf(outgoingMailSchema), 'the outgoing mail');
  protected readonly words = STATE_WORDS;

  constructor() {
    pageHead(() => ({ title: 'Outgoing mail', trail: [] }));
  }
}
