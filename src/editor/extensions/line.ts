import { PageLine } from '@shared/sheet/page'
import type { Desk } from '../desk'
import { LineView } from '../nodeViews/line'

/** The line of the page schema, with its view. */
export const lineExtension = (desk: Desk) =>
  PageLine.extend({
    addNodeView() {
      return ({ node, view, getPos }) => new LineView(node, view, getPos, desk)
    },
  })
