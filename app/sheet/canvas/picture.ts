import { compose, layout, type PanelFrame, type PlotList, type Scene } from '~/drawing'
import type { SheetState, View } from '../state'
import { shown } from '../tools/paths'

/** The drawing as it is on the canvas now. */
export type Picture = {
  scene: Scene
  list: PlotList
  /** Scales of the section itself. */
  frame: PanelFrame
  /** Height, in metres on the section's scale, at which recharge zones are drawn. */
  rechargeTop: number
}

/** `held`: what to show while the view is left to fit itself. */
export function drawPicture(
  state: SheetState,
  size: { width: number; height: number },
  held: View | null = null,
): Picture {
  const section = shown(state.live, state.caseId)
  const scene = compose(section, state.solution, {
    live: state.live,
    units: state.units,
    grid: state.grid,
    arrows: state.showArrows,
    flowLines: state.showFlowLines,
    markup: state.showMarkup,
  })
  const list = layout(scene, { width: size.width, height: size.height, view: state.view ?? held }, state.theme)
  const frame = list.frames.find(({ id }) => id === 'section') ?? list.frames[0]
  if (!frame) throw new Error('The drawing has no section panel.')
  return { scene, list, frame, rechargeTop: topOf(list, frame) }
}

/** Recharge stands on paper height above the ground, so where it is drawn says at what height its ends can be caught. */
function topOf(list: PlotList, frame: PanelFrame): number {
  for (const plot of list.plots) {
    if (plot.kind !== 'path' || !/^recharge\.[^.]+$/.test(plot.of)) continue
    const at = /^M\s*(-?[\d.]+)[ ,]+(-?[\d.]+)/.exec(plot.d)
    if (at) return (Number(at[2]) - frame.ay) / frame.by
  }
  return (frame.box.y + 16 - frame.ay) / frame.by
}
