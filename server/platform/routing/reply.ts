export interface ReplyOptions {
  readonly headers?: Readonly<Record<string, string>>;
  /** Values of Set-Cookie. */
  readonly cookies?: readonly string[];
}

/** An answer with headers or cookies of its own; without them a handler just returns the body. */
export class Reply<Body> {
  readonly headers: Readonly<Record<string, string>>;
  readonly cookies: readonly string[];

  constructor(
    readonly body: Body,
    { headers = {}, cookies = [] }: ReplyOptions = {},
  ) {
    this.headers = headers;
    this.cookies = cookies;
  }
}

/**
 * An answer that is JSON text already, such as a stored result, sent as it is: reading it only to write it again
 * would cost time and, for numbers, prove nothing.
 */
export class JsonText {
  constructor(
    readonly text: string,
    readonly options: ReplyOptions = {},
  ) {}
}
