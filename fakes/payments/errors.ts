/** Errors in the shape of the real service: `{ error: { type, code, message, param } }`. */
export interface FailureBody {
  type: "invalid_request_error" | "idempotency_error" | "card_error" | "api_error";
  message: string;
  code?: string;
  param?: string;
  decline_code?: string;
}

/** Thrown by the acts of the fake; answered with its status and body. */
export class PaymentsFailure extends Error {
  readonly status: number;
  readonly body: FailureBody;

  constructor(status: number, body: FailureBody) {
    super(body.message);
    this.status = status;
    this.body = body;
  }
}

export function invalidRequest(
  message: string,
  details: { code?: string; param?: string } = {},
): PaymentsFailure {
  return new PaymentsFailure(400, { type: "invalid_request_error", message, ...details });
}

export function missingResource(noun: string, id: string): PaymentsFailure {
  return new PaymentsFailure(404, {
    type: "invalid_request_error",
    code: "resource_missing",
    message: `No such ${noun}: '${id}'`,
    param: "id",
  });
}
