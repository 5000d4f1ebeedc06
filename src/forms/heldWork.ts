type Listener = () => void

/** The places on the page that hold something that is not saved yet. */
export class HeldWork {
  private readonly ids = new Set<string>()
  private readonly listeners = new Set<Listener>()

  hold(id: string): void {
    this.ids.add(id)
    this.tell()
  }

  letGo(id: string): void {
    this.ids.delete(id)
    this.tell()
  }

  readonly isHeld = (): boolean => this.ids.size > 0

  readonly subscribe = (listener: Listener): Listener => {
    this.listeners.add(listener)
    return () => {
      this.listeners.delete(listener)
    }
  }

  private tell(): void {
    for (const listener of this.listeners) listener()
  }
}
