/** A percentage as a whole number, never rounded up to more than it is. */
export const wholePercent = (value: number): string => String(Math.floor(value + 1e-9))
