export type * from './contracts'
