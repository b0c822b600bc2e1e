import type Stripe from 'stripe';

export type ErrorType = 'card_error' | 'invalid_request_error' | 'idempotency_error' | 'api_error';

export interface ErrorFields {
  code?: string;
  param?: string;
  decline_code?: string;
  charge?: string;
  payment_intent?: Stripe.PaymentIntent;
  payment_method?: Stripe.PaymentMethod;
  setup_intent?: Stripe.SetupIntent;
}

export interface ErrorBody {
  error: ErrorFields & { type: ErrorType; message: string };
}

/** A refusal in the shape that the SDK turns into its own error classes. */
export class ApiError extends Error {
  constructor(
    readonly status: number,
    readonly type: ErrorType,
    message: string,
    readonly fields: ErrorFields = {},
    readonly options: { keepsState?: boolean; beforeExecution?: boolean } = {},
  ) {
    super(message);
  }

  body(): ErrorBody {
    return { error: { type: this.type, message: this.message, ...this.fields } };
  }
}

/** A parameter that cannot be read. Nothing was executed, so an idempotency key is not used up. */
export function badParameter(param: string, message: string, code = 'parameter_invalid'): ApiError {
  return new ApiError(400, 'invalid_request_error', message, { code, param }, { beforeExecution: true });
}

/** A readable request that the state of things does not allow. */
export function refused(message: string, fields: ErrorFields = {}): ApiError {
  return new ApiError(400, 'invalid_request_error', message, fields);
}

export function missing(kind: string, id: string, param = 'id'): ApiError {
  return new ApiError(404, 'invalid_request_error', `No such ${kind}: '${id}'`, { code: 'resource_missing', param });
}

/** A bank's refusal. The attempt stays on record, so what was written is kept. */
export function declined(message: string, fields: ErrorFields): ApiError {
  return new ApiError(402, 'card_error', message, fields, { keepsState: true });
}
