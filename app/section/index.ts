export { applyCase, type CasePath, casePaths, inCase, offIds } from './cases'
export { describePath, kindAt } from './describe'
export { aboveAt, breaksOf, lineAt } from './geometry/line'
export { areaOf, boxOf, clipToStrip, contains, crossingOf, verticalAt } from './geometry/polygon'
export { FORMAT, VERSION } from './migrate'
export { parseSection } from './parse'
export {
  bankFields,
  FEATURE,
  fieldRule,
  isBankKind,
  isFeatureKind,
  isList,
  LISTS,
  type ListWord,
  NAMED,
  objectFields,
  POINT,
  SECTION,
} from './rules/fields'
export { LIMITS, SLACK } from './rules/limits'
export {
  casePathsOf,
  caseRuleAt,
  caseRuleFor,
  isPathOf,
  OFF_LISTS,
  objectAt,
  placeOf,
  ruleAt,
  valueAt,
} from './rules/paths'
export {
  isDate,
  isId,
  type NumberRule,
  type Rule,
  said,
  type TextRule,
  troubleWith,
  withoutUnseen,
} from './rules/rule'
export { emptySection, isStartingDrawing, STARTING_DRAWINGS, type StartingDrawing, startingDrawing } from './start'
export * from './types'
export * from './units'
export { findProblems } from './validate'
export { problemsOfCase } from './validate/cases'
