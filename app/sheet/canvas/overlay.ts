import { paintDraft } from './overlay-draft'
import { overInks } from './overlay-inks'
import { paintPeers } from './overlay-peers'
import { paintHandles, paintPicked } from './overlay-picked'
import { paintReading } from './overlay-reading'
import type { Over } from './overlay-types'

/** Everything over the drawing, from the quietest to what the eye follows. */
export function paintOver(ctx: CanvasRenderingContext2D, over: Over): void {
  const inks = overInks(over.state.theme)
  paintReading(ctx, over, inks)
  paintPicked(ctx, over, inks)
  paintHandles(ctx, over, inks)
  paintDraft(ctx, over, inks)
  paintPeers(ctx, over, inks)
}
