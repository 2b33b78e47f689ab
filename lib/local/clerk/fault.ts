/** A refusal in the form that the service's own libraries read. */
export class ClerkFault extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly meta: Readonly<Record<string, unknown>> = {},
    /** Seconds after which it may be tried again. */
    readonly retryAfter: number | null = null,
  ) {
    super(message);
    this.name = 'ClerkFault';
  }

  get body() {
    return {
      errors: [{ code: this.code, message: this.message, long_message: this.message, meta: this.meta }],
    };
  }
}

/** A field of a form was refused; `field` is its name as it was sent. */
export const formFault = (code: string, field: string, message: string): ClerkFault =>
  new ClerkFault(422, code, message, { param_name: field });

export const notFound = (what: string): ClerkFault =>
  new ClerkFault(404, 'resource_not_found', `No ${what} was found.`);
