/**
 * The one table of expected failures: code → HTTP status and what a person reads. A failure carries its code and, where
 * it helps, details that are safe to show; never a database detail. Score refusals have their own codes in
 * lib/score/score.ts and reach the web as `score_refused` with their message.
 */
interface ErrorInfo {
  readonly status: number;
  readonly message: string;
}

export const ERRORS = {
  bad_input: { status: 400, message: 'Something in the form cannot be read. The fields say what.' },
  bad_origin: { status: 403, message: 'This request did not come from Understave’s own pages.' },
  signed_out: { status: 401, message: 'Please sign in.' },
  bad_credentials: { status: 401, message: 'This e-mail and password do not match.' },
  not_found: { status: 404, message: 'There is nothing here, or it is not yours to see.' },
  version_conflict: { status: 409, message: 'Someone saved a newer version meanwhile. Your edit is kept; look at both.' },
  already_there: { status: 409, message: 'That exists already.' },
  submission_closed: { status: 409, message: 'This assignment no longer takes work.' },
  already_handed_in: { status: 409, message: 'This was handed in already.' },
  not_ready: { status: 409, message: 'This score is still being read.' },
  in_use: { status: 409, message: 'Something else still needs this.' },
  too_large: { status: 413, message: 'That is too large.' },
  score_refused: { status: 422, message: 'This file cannot be read as a score.' },
  link_expired: { status: 410, message: 'This link has expired or was used. Ask for a new one.' },
  rate_limited: { status: 429, message: 'Too many tries. Please wait a minute.' },
  unavailable: { status: 503, message: 'A part of the service is not answering. Nothing was lost; try again.' },
  internal: { status: 500, message: 'Something went wrong on our side. It was logged; nothing was lost.' },
} as const satisfies Record<string, ErrorInfo>;

export type ErrorCode = keyof typeof ERRORS;

export interface AppError {
  readonly code: ErrorCode;
  /** Replaces the table's message when the case can be said more exactly. */
  readonly message?: string;
  /** Field name → what is wrong with it. */
  readonly fields?: Readonly<Record<string, string>>;
}

export function appError(code: ErrorCode, message?: string, fields?: Readonly<Record<string, string>>): AppError {
  return { code, ...(message ? { message } : {}), ...(fields ? { fields } : {}) };
}

export function messageOf(error: AppError): string {
  return error.message ?? ERRORS[error.code].message;
}
