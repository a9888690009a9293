/** One server-sent event. */
export interface StreamEvent {
  /** Rises; what the browser hands back as Last-Event-ID when it connects again. */
  readonly id: number;
  readonly kind: string;
  readonly data: unknown;
}
