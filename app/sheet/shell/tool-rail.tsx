import { ToolSymbol } from './symbols'
import { READING_TOOLS, TOOL_GROUPS } from './tools'
import { useSheet, useSheetState } from './use-sheet'

/** The tools in one rail below the drawing. Keyboard: one stop, arrows move along, as in any toolbar. */
export function ToolRail() {
  const sheet = useSheet()
  const tool = useSheetState((state) => state.tool)
  const may = useSheetState((state) => state.may)
  const groups =
    may === 'write'
      ? TOOL_GROUPS
      : TOOL_GROUPS.map((group) => group.filter((entry) => READING_TOOLS.has(entry.tool))).filter(
          ({ length }) => length,
        )
  return (
    <section className="rail-place" aria-label="Tool rail">
      <div
        className="tool-rail"
        role="toolbar"
        aria-label="Tools"
        onKeyDown={(event) => {
          const step = event.key === 'ArrowRight' ? 1 : event.key === 'ArrowLeft' ? -1 : 0
          if (!step) return
          const buttons: Element[] = [...event.currentTarget.querySelectorAll('button')]
          const at = document.activeElement ? buttons.indexOf(document.activeElement) : -1
          const next = buttons[(at + step + buttons.length) % buttons.length]
          if (next instanceof HTMLElement) next.focus()
          event.preventDefault()
          event.stopPropagation()
        }}
      >
        {groups.map((group) => (
          <div className="tool-group" key={group[0]?.tool}>
            {group.map((entry) => (
              <button
                key={entry.tool}
                type="button"
                className="tool"
                data-tool={entry.tool}
                aria-pressed={tool === entry.tool}
                tabIndex={tool === entry.tool ? 0 : -1}
                title={`${entry.does} (${entry.key})`}
                onClick={() => sheet.set({ tool: entry.tool })}
              >
                <ToolSymbol tool={entry.tool} />
                <span>{entry.label}</span>
              </button>
            ))}
          </div>
        ))}
        {may === 'read' ? (
          <p className="rail-caution">
            A screening estimate under the Dupuit–Forchheimer assumptions: no substitute for site investigation, local
            codes or the judgement of a licensed professional.
          </p>
        ) : null}
      </div>
    </section>
  )
}
