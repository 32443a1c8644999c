import { databaseAnswers } from '~/server/health.server'

/** 200 when the database answers, 503 otherwise. */
export async function loader() {
  const ok = await databaseAnswers()
  const body = { ok, database: ok ? 'answers' : 'does not answer' }
  return Response.json(body, { status: ok ? 200 : 503, headers: { 'cache-control': 'no-store' } })
}
