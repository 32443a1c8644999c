// Gauss–Kronrod (7,15) abscissae and weights, Piessens et al., QUADPACK (1983).
const NODES = [
  0.991455371120812639206854697526329, 0.949107912342758524526189684047851, 0.864864423359769072789712788640926,
  0.741531185599394439863864773280788, 0.58608723546769113029414482583873, 0.405845151377397166906606412076961,
  0.207784955007898467600689403773245, 0,
]
const KRONROD = [
  0.02293532201052922496373200805897, 0.063092092629978553290700663189204, 0.104790010322250183839876322541518,
  0.140653259715525918745189590510238, 0.16900472663926790282829543337, 0.190350578064785409913256402421014,
  0.204432940075298892414161999234649, 0.209482141084727828012999174891714,
]
const GAUSS = [
  0.129484966168869693270611432679082, 0.27970539148927666790146777142378, 0.381830050505118944950369775488975,
  0.417959183673469387755102040816327,
]

/**
 * ∫ f from a to b by adaptive Gauss–Kronrod quadrature to a relative accuracy, or Infinity when it does not settle within
 * `depth` halvings (an integrand that blows up, such as the time to leave a divide).
 */
export function integrate(f: (x: number) => number, a: number, b: number, relative = 1e-9, depth = 40): number {
  const panel = (from: number, to: number) => {
    const centre = (from + to) / 2
    const half = (to - from) / 2
    let kronrod = 0
    let gauss = 0
    for (const [i, node] of NODES.entries()) {
      const value = node === 0 ? f(centre) : f(centre - half * node) + f(centre + half * node)
      kronrod += (KRONROD[i] ?? 0) * value
      if (i % 2 === 1) gauss += (GAUSS[(i - 1) / 2] ?? 0) * value
    }
    return { value: kronrod * half, error: Math.abs(kronrod - gauss) * Math.abs(half) }
  }
  const whole = panel(a, b)
  const scale = Math.abs(whole.value)
  const refine = (from: number, to: number, got: { value: number; error: number }, left: number): number => {
    if (!Number.isFinite(got.value)) return Number.POSITIVE_INFINITY
    if (got.error <= relative * Math.max(Math.abs(got.value), scale * ((to - from) / (b - a)))) return got.value
    if (left === 0) return got.error > 1e-3 * Math.abs(got.value) ? Number.POSITIVE_INFINITY : got.value
    const middle = (from + to) / 2
    if (middle === from || middle === to) return got.value
    return refine(from, middle, panel(from, middle), left - 1) + refine(middle, to, panel(middle, to), left - 1)
  }
  return refine(a, b, whole, depth)
}
