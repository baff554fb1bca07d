/** What is wrong in the curation, each in one line: file, row, what, the mend. Collected, so that all are told at once. */
export class Problems {
  readonly lines: string[] = []

  add(where: string, what: string): void {
    this.lines.push(`${where}: ${what}`)
  }
}
