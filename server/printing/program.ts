/** The Typst program, part of the bundle: there is no file to find when the server runs. */
import figure from './program/figure.typ?raw'
import line from './program/line.typ?raw'
import main from './program/main.typ?raw'
import mathematics from './program/mathematics.typ?raw'
import paper from './program/paper.typ?raw'
import prose from './program/prose.typ?raw'
import titleBlock from './program/titleBlock.typ?raw'

export const typstProgram: Record<string, string> = {
  'figure.typ': figure,
  'line.typ': line,
  'main.typ': main,
  'mathematics.typ': mathematics,
  'paper.typ': paper,
  'prose.typ': prose,
  'titleBlock.typ': titleBlock,
}
