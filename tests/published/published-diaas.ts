import type { PatternId } from '../../src/nutrition/pattern.ts'

const child: PatternId = 'fao-2013-child'
const over3: PatternId = 'fao-2013-over-3y'

/** A published DIAAS (per cent) and the food of the table that is the same, or the nearest state of it. */
export type PublishedDiaas = readonly [id: string, pattern: PatternId, diaas: number, source: string]

const R2015 = 'J Nutr 2015;145:372, rat'
const P2017 = 'Br J Nutr 2017;117:490, pig'
const MEANS = 'Food Sci Nutr 2020;8:5379, mean of data sets; memory'
const P2014 = 'Br J Nutr 2014;111:1663, pig, raw grain; read; pattern as its review says'
const R2018 = 'Br J Nutr 2018, nine cooked cereals, rat; read (abstract); pattern uncertain'
const E2017 = 'Food Sci Nutr 2017;5:896, rat, estimated from faecal digestibility; memory'
const P2021 = 'Plants 2021;10:1999, pig, cooked; read (abstract)'

/**
 * Every published DIAAS of a single food that was found and that the table has, good or bad. Left out are foods that
 * the table has not (milk protein concentrate, gelatin, zein, corn flakes, adlay, tartary buckwheat, sausages, single
 * cuts of beef) and a second process of the same flour in the same study.
 */
export const PUBLISHED_DIAAS: readonly PublishedDiaas[] = [
  ['whey-protein', child, 109, `${R2015}, isolate; read`],
  ['whey-protein', child, 97.3, `${R2015}, concentrate; read`],
  ['soy-protein-isolate', child, 90.6, `${R2015}; read`],
  ['soy-protein-isolate', child, 89.8, `${R2015}, another; read`],
  ['pea-protein', child, 82.2, `${R2015}; read`],
  ['rice-protein', child, 37.1, `${R2015}; read`],
  ['rice-white-boiled', child, 59.5, `${R2015}; memory`],
  ['kidney-beans-boiled', child, 58.8, `${R2015}; memory`],
  ['peas-whole-boiled', child, 57.9, `${R2015}; memory`],
  ['oats-boiled', child, 54.2, `${R2015}; memory`],
  ['peanuts-roasted', child, 43.4, `${R2015}; memory`],
  ['wheat-bran', child, 41.1, `${R2015}; memory`],
  ['whey-protein', over3, 125, `${P2017}, isolate; read`],
  ['whey-protein', over3, 133, `${P2017}, concentrate; read`],
  ['whey-protein', child, 107, `${P2017}, concentrate; memory`],
  ['milk-powder-skimmed', over3, 123, `${P2017}; read`],
  ['milk-powder-skimmed', child, 105, `${P2017}; memory`],
  ['pea-protein', over3, 73, `${P2017}; read`],
  ['pea-protein', child, 62, `${P2017}; memory`],
  ['soy-protein-isolate', over3, 98, `${P2017}; read`],
  ['soy-protein-isolate', child, 84, `${P2017}; memory`],
  ['soy-flour-defatted', over3, 105, `${P2017}; read`],
  ['soy-flour-defatted', child, 89, `${P2017}; memory`],
  ['wheat-berries-dry', over3, 54, `${P2017}; memory`],
  ['wheat-berries-dry', child, 45, `${P2017}; memory`],
  ['maize-dry', child, 36, MEANS],
  ['rice-white-boiled', child, 47, MEANS],
  ['wheat-berries-dry', child, 48, MEANS],
  ['hemp-seeds-hulled', child, 54, MEANS],
  ['broad-beans-boiled', child, 55, MEANS],
  ['oats-rolled', child, 57, MEANS],
  ['lupins-boiled', child, 68, MEANS],
  ['split-peas-green-boiled', child, 70, MEANS],
  ['whey-protein', child, 85, MEANS],
  ['soybeans-boiled', child, 91, MEANS],
  ['potato-protein', child, 100, MEANS],
  ['eggs-boiled', child, 101, MEANS],
  ['pork-loin-roasted', child, 117, MEANS],
  ['casein', child, 117, MEANS],
  ['milk-whole', child, 122, 'FAO Food and Nutrition Paper 92 (2013), whole milk powder; read'],
  ['milk-whole', over3, 143, 'FAO Food and Nutrition Paper 92 (2013), whole milk powder; read'],
  ['peas-whole-dry', child, 64, 'FAO Food and Nutrition Paper 92 (2013); read'],
  ['wheat-berries-dry', child, 40, 'FAO Food and Nutrition Paper 92 (2013); read'],
  ['oats-steel-cut-dry', over3, 77, P2014],
  ['rice-white-dry', over3, 64, P2014],
  ['barley-hulled-dry', over3, 51, P2014],
  ['maize-dry', over3, 48, P2014],
  ['rye-dry', over3, 47, P2014],
  ['wheat-berries-dry', over3, 43, P2014],
  ['sorghum-dry', over3, 29, P2014],
  ['beef-minced-fried', over3, 99, 'Br J Nutr 2020, meat products, pig; read'],
  ['buckwheat-boiled', child, 68, R2018],
  ['oats-boiled', child, 43, R2018],
  ['rice-brown-boiled', child, 42, R2018],
  ['rice-white-boiled', child, 37, R2018],
  ['wheat-berries-boiled', child, 20, R2018],
  ['millet-boiled', child, 7, `${R2018}, proso`],
  ['mung-beans-boiled', over3, 93, P2021],
  ['adzuki-beans-boiled', over3, 78, P2021],
  ['millet-boiled', over3, 22, P2021],
  ['milk-powder-skimmed', child, 123, 'J Nutr 2021, dry milk, pig; read (abstract)'],
  ['milk-powder-skimmed', over3, 144, 'J Nutr 2021, dry milk, pig; read (abstract)'],
  ['oats-rolled', child, 57, 'J Nutr 2021, quick oats, pig; read (abstract)'],
  ['oats-rolled', over3, 67, 'J Nutr 2021, quick oats, pig; read (abstract)'],
  ['pistachios-raw', over3, 86, 'J Sci Food Agric 2020, pig; read; pattern not stated'],
  ['pistachios', over3, 83, 'J Sci Food Agric 2020, roasted, pig; read; pattern not stated'],
  ['pea-protein', over3, 100, 'Am J Clin Nutr 2022;115:353, human; read (abstract); pattern not stated'],
  ['casein', over3, 145, 'Am J Clin Nutr 2022;115:353, human; read (abstract); pattern not stated'],
  ['whey-protein', over3, 103, 'Am J Clin Nutr 2021, isolate, human; read (abstract); pattern not stated'],
  ['lentils-red-boiled', child, 54, 'Food Chem 2018;240:588, rat, mean of processes; read (abstract)'],
  ['lentils-green-boiled', child, 49, 'Food Chem 2018;240:588, rat, mean of processes; read (abstract)'],
  ['split-peas-green-boiled', child, 67, 'J Agric Food Chem 2017;65:7790, rat, cooked; read (abstract)'],
  ['split-peas-yellow-boiled', child, 67, 'J Agric Food Chem 2017;65:7790, rat, extruded; read (abstract)'],
  ['chickpeas-boiled', child, 78, 'Food Sci Nutr 2020;8:2950, rat, cooked; read (abstract)'],
  ['pinto-beans-boiled', child, 61, 'Nutrients 2018;10:671, mean of Phaseolus, rat; read (abstract)'],
  ['navy-beans-boiled', child, 61, 'Nutrients 2018;10:671, mean of Phaseolus, rat; read (abstract)'],
  ['black-beans-boiled', child, 61, 'Nutrients 2018;10:671, mean of Phaseolus, rat; read (abstract)'],
  ['broad-beans-boiled', child, 61, 'Nutrients 2018;10:671, baked, rat; read (abstract)'],
  ['kidney-beans-boiled', child, 51, E2017],
  ['navy-beans-boiled', child, 65, E2017],
  ['lentils-green-boiled', child, 58, E2017],
  ['lentils-red-boiled', child, 50, E2017],
  ['split-peas-yellow-boiled', child, 73, E2017],
  ['split-peas-green-boiled', child, 46, E2017],
  ['black-beans-boiled', child, 49, E2017],
  ['chickpeas-boiled', child, 67, E2017],
  ['pinto-beans-boiled', child, 60, E2017],
  ['tofu-firm', over3, 97, 'Food Chem 2021;338:128020, minipig; read (abstract), pattern not stated'],
  ['soy-milk', over3, 117, 'Food Chem 2021;338:128020, minipig; read (abstract), pattern not stated'],
]
