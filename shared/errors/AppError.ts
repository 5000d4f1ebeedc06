import { ERROR_CODES, type ErrorCode } from './codes.ts'

export type ErrorDetail = {
  /** What exactly is wrong, for a person; replaces the code's general sentence. */
  message?: string
  /** Path of the field in the body or query, and the sentence to show beside it. */
  fields?: Record<string, string>
  /** Whatever a client needs to go on, such as the other version of a record. */
  more?: Record<string, unknown>
}

/** An expected refusal. Everything else that is thrown is a fault and answers only a request id. */
export class AppError extends Error {
  readonly code: ErrorCode
  readonly detail: ErrorDetail

  constructor(code: ErrorCode, detail: ErrorDetail = {}) {
    super(detail.message ?? ERROR_CODES[code][1])
    this.name = 'AppError'
    this.code = code
    this.detail = detail
  }

  get status(): number {
    return ERROR_CODES[this.code][0]
  }
}

/** Refuses with a sentence at one field. */
export function refuseField(field: string, message: string): never {
  throw new AppError('invalid', { fields: { [field]: message } })
}
