import { Button } from '../ui/Button.tsx'
import { PageHead } from '../ui/PageHead.tsx'

/** Where the second window of a sign-in ends. */
export function SignedInAgain() {
  return (
    <main className="mx-auto max-w-lg p-8">
      <PageHead title="You are signed in again" />
      <p className="mb-4">
        Close this window and go on in the first one. What you entered there is still there.
      </p>
      <Button onClick={() => window.close()}>Close this window</Button>
    </main>
  )
}
