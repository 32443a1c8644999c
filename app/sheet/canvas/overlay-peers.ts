import type { OverInks } from './overlay-inks'
import { outlinePicked } from './overlay-picked'
import type { Over } from './overlay-types'
import { peerInk } from './peer-inks'
import { toPixels } from './surface'

const FONT = '600 11px "Work Sans", "DejaVu Sans", sans-serif'

/** The others: what each has picked, their pointer with their name, their reading line as a short tick. */
export function paintPeers(ctx: CanvasRenderingContext2D, over: Over, inks: OverInks): void {
  const { state, picture } = over
  for (const peer of state.peers) {
    const colour = peerInk(state.theme, peer.who.ink)
    if (peer.picked && peer.picked.length > 0) outlinePicked(ctx, over, peer.picked, colour, [5, 3])
    if (!peer.pointer) continue
    const { x, y } = toPixels(picture, peer.pointer)
    // A pointer beside one's own window is shown at its edge, so that one knows where to look.
    const { width, height } = picture.list
    const px = Math.min(width - 6, Math.max(6, x))
    const py = Math.min(height - 6, Math.max(6, y))
    const away = px !== x || py !== y
    arrow(ctx, px, py, colour, inks.paper, away ? 0.5 : 1)
    tag(ctx, peer.who.name, px, py, width, height, colour, inks.paper)
  }
}

function arrow(ctx: CanvasRenderingContext2D, x: number, y: number, colour: string, edge: string, alpha: number) {
  ctx.globalAlpha = alpha
  ctx.beginPath()
  ctx.moveTo(x, y)
  ctx.lineTo(x + 4.5, y + 13)
  ctx.lineTo(x + 7, y + 7.5)
  ctx.lineTo(x + 13, y + 6.5)
  ctx.closePath()
  ctx.fillStyle = colour
  ctx.fill()
  ctx.setLineDash([])
  ctx.lineWidth = 1
  ctx.strokeStyle = edge
  ctx.stroke()
  ctx.globalAlpha = 1
}

function tag(
  ctx: CanvasRenderingContext2D,
  name: string,
  x: number,
  y: number,
  within: number,
  below: number,
  colour: string,
  text: string,
) {
  ctx.font = FONT
  const short = name.length > 24 ? `${name.slice(0, 23)}…` : name
  const width = ctx.measureText(short).width + 10
  const left = x + 12 + width > within ? x - width - 4 : x + 12
  const top = y + 30 > below ? y - 20 : y + 12
  ctx.fillStyle = colour
  ctx.beginPath()
  ctx.roundRect(left, top, width, 17, 2)
  ctx.fill()
  ctx.fillStyle = text
  ctx.textAlign = 'left'
  ctx.textBaseline = 'middle'
  ctx.fillText(short, left + 5, top + 9)
}
