import { wholeScore } from '../text/figures.ts'

/** A stave in whole per cent, rounded as the score is, so that the shortest stave and the DIAAS are one figure. */
export const wholePercent = (value: number): string => wholeScore(value)
