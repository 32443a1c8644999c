/** Rows without their drawings, which the page fetches one by one and the browser keeps: a list stays light. */
export const light = <Row extends { thumbnail: string | null }>(rows: Row[]) =>
  rows.map(({ thumbnail, ...row }) => ({ ...row, drawn: thumbnail !== null }))
