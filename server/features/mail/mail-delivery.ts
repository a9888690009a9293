import { deliverDueLetters, type DeliverDependencies } from './mail.usecases';

const LOOK_AGAIN_MS = 5_000;

/** Sends the outbox's letters as long as the server runs. */
export interface MailDelivery {
  /** Waits for the letter under way. */
  stop(): Promise<void>;
}

export function startMailDelivery(dependencies: DeliverDependencies): MailDelivery {
  let stopped = false;
  let timer: NodeJS.Timeout | undefined;
  let underWay: Promise<void> = Promise.resolve();

  const round = async () => {
    try {
      await deliverDueLetters(dependencies);
    } catch (error) {
      dependencies.log.warn({ error }, 'the outbox could not be read');
    }
    if (!stopped) timer = setTimeout(begin, LOOK_AGAIN_MS);
  };
  const begin = () => {
    underWay = round();
  };
  begin();
  return {
    stop: async () => {
      stopped = true;
      clearTimeout(timer);
      await underWay;
      dependencies.transport.close();
    },
  };
}
