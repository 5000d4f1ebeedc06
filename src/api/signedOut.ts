type Listener = () => void

const listeners = new Set<Listener>()

/** Calls the listener whenever the server says that the login has ended; returns the way to stop. */
export function onSignedOut(listener: Listener): () => void {
  listeners.add(listener)
  return () => {
    listeners.delete(listener)
  }
}

export function tellSignedOut(): void {
  for (const listener of listeners) listener()
}
