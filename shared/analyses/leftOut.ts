import { LEFT_OUT_REASONS, type LeftOutReason } from '#shared/terms/analysis.ts'

/** Counts of subjects left out, by reason, in the order of the reasons; reasons without any are not named. */
export class LeftOut {
  readonly #counts = new Map<LeftOutReason, number>()

  add(reason: LeftOutReason): void {
    this.#counts.set(reason, (this.#counts.get(reason) ?? 0) + 1)
  }

  list(): { reason: LeftOutReason; subjects: number }[] {
    return LEFT_OUT_REASONS.flatMap((reason) => {
      const subjects = this.#counts.get(reason)
      return subjects ? [{ reason, subjects }] : []
    })
  }
}
