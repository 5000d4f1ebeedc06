/**
 * An invented trace from closed formulas. Its first exhalation is the worked example of
 * docs/methods/breath.md; the second lies a little lower; the third stops early.
 */
export function inventedTrace(): string {
  const lines = ['# instrument_serial: invented', 'time_s,co2_percent,flow_ml_s,isoprene_ppb']
  for (let tick = 0; tick <= LAST_TICK; tick++) lines.push([tick / 10, ...sampleAt(tick)].join(','))
  return `${lines.join('\n')}\n`
}

/** Tenths of a second. */
const LAST_TICK = 1040
const EXHALATIONS = [
  { startTick: 20, ticks: 100, isoprenePpb: 480 },
  { startTick: 470, ticks: 100, isoprenePpb: 465 },
  { startTick: 920, ticks: 50, isoprenePpb: 470 },
] as const
const ROOM_AIR_CO2_PERCENT = 0.04
const ROOM_AIR_PPB = 20
const FLOW_ML_S = 50

/** CO2 in %, flow in mL/s, isoprene in ppb. */
function sampleAt(tick: number): [number, number, number] {
  const breath = EXHALATIONS.find(
    ({ startTick, ticks }) => tick >= startTick && tick < startTick + ticks,
  )
  if (!breath) return [ROOM_AIR_CO2_PERCENT, 0, ROOM_AIR_PPB]
  const s = (tick - breath.startTick) / 10
  return [
    figures(ROOM_AIR_CO2_PERCENT + 4.8 * (1 - Math.exp(-s / 0.5)) + 0.04 * s),
    FLOW_ML_S,
    figures(ROOM_AIR_PPB + breath.isoprenePpb * (1 - Math.exp(-s / 1.5))),
  ]
}

/** Nine significant figures keep the worked example's six. */
const figures = (value: number) => Number(value.toPrecision(9))
