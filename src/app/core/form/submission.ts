import { signal, type Signal } from '@angular/core';
import type { FormGroup } from '@angular/forms';
import { Refusal, refusalText } from '../api';

/** Sending of a form: at most one at a time, with the server's faults put under the fields they belong to. */
export interface Submission {
  readonly sending: Signal<boolean>;
  readonly fault: Signal<string>;
  send(act: () => Promise<void>): Promise<void>;
  say(fault: string): void;
}

export function submission(form: FormGroup): Submission {
  const sending = signal(false);
  const fault = signal('');
  return {
    sending: sending.asReadonly(),
    fault: fault.asReadonly(),
    say: (text) => fault.set(text),
    async send(act) {
      form.markAllAsTouched();
      if (form.invalid || sending()) return;
      sending.set(true);
      fault.set('');
      try {
        await act();
      } catch (error) {
        if (!putUnderFields(form, error)) fault.set(refusalText(error));
      } finally {
        sending.set(false);
      }
    },
  };
}

/** True where every fault found its field, so that nothing is left to say above the form. */
function putUnderFields(form: FormGroup, error: unknown): boolean {
  const faults = error instanceof Refusal ? (error.problem?.faults ?? []) : [];
  const placed = faults.filter(({ path, message }) => {
    const control = form.get(path);
    control?.setErrors({ fault: message });
    return control !== null;
  });
  return placed.length > 0 && placed.length === faults.length;
}
