export * from './address'
export { applyAll, applyOperation } from './apply/apply-operation'
export { quantityOf } from './apply/convert-number'
export { systemWords } from './apply/convert-units'
export { refusedName } from './apply/names'
export * from './contracts'
export {
  createEngineClient,
  type EngineClient,
  type EngineClientOptions,
  type EngineClientStatus,
  type ManyTried,
} from './engine/client'
export type { ClientPort, EngineReply, EngineRequest, ServerPort, TriedValues } from './engine/protocol'
export * from './entry'
export * from './formula/bounds'
export * from './formula/scan'
export { type QuantityWarning, quantityWarnings } from './kinds/warnings'
export * from './limits'
export * from './lookup'
export * from './model'
export * from './operations'
export * from './permission'
export type { SheetGround } from './rebase/ground'
export { type Rebased, rebase, squash } from './rebase/rebase'
export * from './serial'
export { type Evaluate, type Solved, type SolveRequest, solveFor } from './solve/solve-for'
export * from './tsv'
export { ValueCache } from './values/cache'
export { packedValue, transferOf, unpack } from './values/packed'
export * from './wire'
export { sayFormula } from './words/say'
