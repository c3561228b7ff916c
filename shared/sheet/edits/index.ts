/** Edits of a live document: functions on the Y.Doc, each one transaction, whoever asks for them. */
export { asOneStep, newId, ownEdit } from './transaction'
export type { Place } from './transaction'
export { replaceLine, setField, setFields, setFront, setSource } from './fields'
export {
  dropSetAside,
  duplicateLine,
  insertBlocks,
  insertLine,
  moveLine,
  placeOfLine,
  removeLine,
  restoreLine,
  separateRepeatedLine,
} from './lines'
export { addRow, moveRow, removeRow, renameColumn, setCell } from './rows'
export type { TableName } from './rows'
export { freeSymbol, nextAnalysisSymbol, nextCriterionSymbol, nextSymbol } from './symbols'
export { renameSymbol } from './renameSymbol'
