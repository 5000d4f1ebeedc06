/**
 * Places marks beside each other so that none hides another: each keeps its place along the axis and
 * moves across it as little as it must. The same values always give the same picture.
 * @param places along the axis, in figure units
 * @param distance least distance between two middles, in the same units
 * @param limit farthest that a mark may move across
 * @returns the move of each mark, in the order given, or null where the limit does not suffice
 */
export function swarm(places: readonly number[], distance: number, limit: number): number[] | null {
  const order = places.map((_, at) => at).sort((a, b) => places[a]! - places[b]! || a - b)
  const moves = new Array<number>(places.length).fill(0)
  let first = 0
  for (const [rank, at] of order.entries()) {
    while (places[order[first]!]! <= places[at]! - distance) first += 1
    const near = order.slice(first, rank).map((other) => ({
      move: moves[other]!,
      reach: Math.sqrt(Math.max(0, distance ** 2 - (places[at]! - places[other]!) ** 2)),
    }))
    const move = leastMove(near, rank % 2 === 0)
    if (Math.abs(move) > limit) return null
    moves[at] = move
  }
  return moves
}

/** The smallest move that is out of reach of all neighbours; ties go up or down in turn. */
function leastMove(near: readonly { move: number; reach: number }[], upFirst: boolean): number {
  const choices = [0, ...near.flatMap(({ move, reach }) => [move - reach, move + reach])]
  const side = (move: number) => (move < 0 === upFirst ? 0 : 1)
  choices.sort((a, b) => Math.abs(a) - Math.abs(b) || side(a) - side(b))
  const isFree = (choice: number) =>
    near.every(({ move, reach }) => Math.abs(choice - move) >= reach - 1e-9)
  return choices.find(isFree) ?? Number.POSITIVE_INFINITY
}
