declare const BUNDLED_DATA: string | undefined

/** Where a data file stands that ships with the program: beside the bundle, or in data/ when run from source. */
export function dataFile(name: string): URL {
  return new URL((typeof BUNDLED_DATA === 'string' ? BUNDLED_DATA : '../../data/') + name, import.meta.url)
}
