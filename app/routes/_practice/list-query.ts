/** What a list was asked for in its address. Unknown words fall back to the list's own order. */
export function listQuery<Sort extends string>(request: Request, sorts: readonly Sort[]) {
  const params = new URL(request.url).searchParams
  const sort = sorts.find((known) => known === params.get('sort'))
  return {
    search: params.get('search') ?? '',
    ...(sort && { sort }),
    descending: params.get('order') === 'down',
    archived: params.get('archived') === '1',
    page: Math.max(1, Math.floor(Number(params.get('page')) || 1)),
  }
}
