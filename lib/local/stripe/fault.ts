/** The body of a refusal, in the service's own field names. */
export interface ErrorBody {
  readonly type: 'invalid_request_error' | 'card_error' | 'idempotency_error' | 'api_error';
  readonly message: string;
  readonly code?: string;
  readonly decline_code?: string;
  readonly param?: string;
  readonly charge?: string;
  readonly payment_intent?: unknown;
  readonly payment_method?: unknown;
}

/** A refusal: an HTTP status and its body. */
export class ApiFault extends Error {
  constructor(
    readonly status: number,
    readonly body: ErrorBody,
  ) {
    super(body.message);
    this.name = 'ApiFault';
  }
}

export const invalid = (message: string, more: { param?: string; code?: string; status?: number } = {}) => {
  const { status = 400, ...rest } = more;
  return new ApiFault(status, { type: 'invalid_request_error', message, ...rest });
};

export const missing = (kind: string, id: string, param = 'id') =>
  invalid(`No such ${kind}: '${id}'`, { param, code: 'resource_missing', status: 404 });
