// Gauss–Kronrod (7,15) abscissae and weights, Piessens et al., QUADPACK (1983).
const NODES = [
  0.9914553711208126, 0.9491079123427585, 0.8648644233597691, 0.7415311855993945, 0.5860872354676911,
  0.4058451513773972, 0.20778495500789848, 0,
]
const KRONROD = [
  0.022935322010529224, 0.06309209262997856, 0.10479001032225019, 0.14065325971552592, 0.1690047266392679,
  0.19035057806478542, 0.20443294007529889, 0.20948214108472782,
]
const GAUSS = [0.1294849661688697, 0.27970539148927664, 0.3818300505051189, 0.4179591836734694]

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
