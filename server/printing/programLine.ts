/** What the numbers and pages were made by: stands at the foot of each page. */
import { dependencies } from '../../package.json'
import { FORMAT_VERSION } from '@shared/sheet/sheet'

export const programLine = (version: string): string =>
  [
    `Torfolio ${version}, sheet format ${FORMAT_VERSION}`,
    `computed with mathjs ${dependencies.mathjs}`,
    `set with Typst (typst-ts-node-compiler ${dependencies['@myriaddreamin/typst-ts-node-compiler']})`,
  ].join(' · ')
