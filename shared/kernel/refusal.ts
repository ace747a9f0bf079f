/** Why a request was refused; each code has one HTTP status. */
export const refusalStatus = {
  invalid: 400,
  signedOut: 401,
  forbidden: 403,
  missing: 404,
  conflict: 409,
  tooLarge: 413,
  tooMany: 429,
  unavailable: 503,
  offline: 0,
} as const;

export type RefusalCode = keyof typeof refusalStatus;

/** An expected "no", written for the person who asked. `fields` are keyed by dotted path; `extra` carries what a screen needs to mend it. */
export class Refusal extends Error {
  readonly code: RefusalCode;
  readonly fields: Record<string, string>;
  readonly extra: Record<string, unknown>;

  constructor(
    code: RefusalCode,
    message: string,
    { fields = {}, extra = {} }: { fields?: Record<string, string>; extra?: Record<string, unknown> } = {},
  ) {
    super(message);
    this.name = 'Refusal';
    this.code = code;
    this.fields = fields;
    this.extra = extra;
  }
}

/** The wire form of a refusal: RFC 9457 problem details. */
export type Problem = {
  type: string;
  title: string;
  status: number;
  detail: string;
  code: RefusalCode | 'bug';
  fields?: Record<string, string>;
  extra?: Record<string, unknown>;
  /** To quote to support; stands in the server's log. */
  reference?: string;
};
