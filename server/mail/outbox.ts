import { newId } from '#db/id.ts'
import { mails } from '#db/schema/mails.ts'
import type { ChangeTx } from '#server/changes/ChangeTx.ts'

/** A letter: counts and a link. Never a value, a code or anything of a class. */
export type Letter = { recipient: string; subject: string; text: string }

/** Puts letters into the outbox as part of a change: they go out exactly when it was committed. */
export async function writeLetters(tx: ChangeTx, letters: readonly Letter[]): Promise<void> {
  if (letters.length === 0) return
  await tx.put(
    mails,
    letters.map((letter) => ({
      ...letter,
      id: newId(),
      studyId: tx.allowed.studyId,
      state: 'waiting' as const,
      nextAttemptAt: tx.at,
      writtenAt: tx.at,
    })),
  )
}
