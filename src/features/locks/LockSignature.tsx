import type { Lock } from '#shared/schemas/lock.ts'
import { CopyableHash } from '../../ui/CopyableHash.tsx'
import { Facts } from '../../ui/Facts.tsx'
import { InstantText } from '../../ui/InstantText.tsx'

/** The signature under an approved lock, as it was given. */
export function LockSignature({ lock }: { lock: Lock }) {
  const { signature } = lock
  if (!signature) return null
  return (
    <section aria-labelledby="signed" className="mb-6">
      <h2 id="signed">Signed</h2>
      <Facts
        layout="rows"
        items={[
          { term: 'Name', value: signature.printedName },
          { term: 'Time', value: <InstantText at={signature.signedAt} precision="second" /> },
          { term: 'Meaning', value: signature.meaning },
          { term: 'Reason', value: lock.decisionNote ?? 'none given' },
          {
            term: 'Signed in afresh',
            value: <InstantText at={signature.authenticatedAt} precision="second" />,
          },
          {
            term: 'Dataset signed',
            value: <CopyableHash value={signature.recordHash} label="hash of the signed dataset" />,
          },
        ]}
      />
    </section>
  )
}
