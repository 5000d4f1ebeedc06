/** Repeatable random numbers (Park and Miller 1988, multiplier 16807): the demonstration is the same everywhere. */
export class SeededRandom {
  #state: number

  constructor(seed: number) {
    this.#state = seed
  }

  /** Uniform between 0 and 1, both excluded. */
  uniform(): number {
    this.#state = (this.#state * 16_807) % 2_147_483_647
    return this.#state / 2_147_483_647
  }

  /** Standard normal (Box and Muller 1958). */
  normal(): number {
    return Math.sqrt(-2 * Math.log(this.uniform())) * Math.cos(2 * Math.PI * this.uniform())
  }

  /** One of several, each as likely. */
  pick<T>(choices: readonly T[]): T {
    return choices[Math.floor(this.uniform() * choices.length)]!
  }
}
