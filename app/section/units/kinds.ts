/** What a number is, which decides the units it may be typed in and how it is shown. Stored in metres and days. */
export type QuantityKind =
  | 'distance'
  | 'elevation'
  | 'length'
  | 'small-length'
  | 'conductivity'
  | 'recharge'
  | 'flow'
  | 'km-flow'
  | 'conductance'
  | 'ratio'
  | 'time'

export type UnitSet = 'si' | 'us'
