/** The socket between a sheet in the browser and the server: see README.md beside this file. */
export * from './limits'
export * from './closeCodes'
export * from './handshake'
export * from './presence'
export * from './penKeys'
export * from './messages'
export * from './frames'
