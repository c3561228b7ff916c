/** All entities, named one by one so that a bundle carries them. */
import { Account } from './Account'
import { AuditEvent } from './AuditEvent'
import { Calculation } from './Calculation'
import { Contribution } from './Contribution'
import { Document } from './Document'
import { DocumentClient } from './DocumentClient'
import { DocumentState } from './DocumentState'
import { DocumentUpdate } from './DocumentUpdate'
import { Firm } from './Firm'
import { Membership } from './Membership'
import { Participation } from './Participation'
import { Pen } from './Pen'
import { Project } from './Project'
import { RateWindow } from './RateWindow'
import { Revision } from './Revision'
import { Session } from './Session'
import { Token } from './Token'

export const entities = [
  Account,
  AuditEvent,
  Calculation,
  Contribution,
  Document,
  DocumentClient,
  DocumentState,
  DocumentUpdate,
  Firm,
  Membership,
  Participation,
  Pen,
  Project,
  RateWindow,
  Revision,
  Session,
  Token,
]

export {
  Account,
  AuditEvent,
  Calculation,
  Contribution,
  Document,
  DocumentClient,
  DocumentState,
  DocumentUpdate,
  Firm,
  Membership,
  Participation,
  Pen,
  Project,
  RateWindow,
  Revision,
  Session,
  Token,
}
