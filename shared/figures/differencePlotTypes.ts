/** Sensor and reference of one subject, already subtracted (or divided) and averaged. */
export interface DifferencePair {
  mean: number
  difference: number
  subject?: string
}

/** A line over the means: level, or sloping where bias or limits change with the size of the value. */
export interface AgreementLine {
  /** Height of a level line, or where a sloping one meets a mean of nought. */
  intercept: number
  slope?: number
  /** 95 % interval of a level line. */
  interval?: { lower: number; upper: number }
}

export interface DifferencePlotData {
  pairs: readonly DifferencePair[]
  bias: AgreementLine
  lowerLimit: AgreementLine
  upperLimit: AgreementLine
  /** Limits agreed before the study, between which the sensor would be acceptable. */
  acceptance?: { lower: number; upper: number }
  /** Unit of the mean. */
  unit: string
  /** Unit of the difference where it is another, such as % of the mean. */
  differenceUnit?: string
  /** What is plotted; "Mean of sensor and reference" and "Sensor − reference" unless given. */
  meanLabel?: string
  differenceLabel?: string
  /** What the lines are called where they are not bias and limits of agreement. */
  lineNames?: { upper: string; middle: string; lower: string }
}
