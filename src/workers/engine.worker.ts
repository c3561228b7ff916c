/// <reference lib="webworker" />
import { analyses } from '@shared/analyses/registry'
import { createSheetEngine } from '@shared/pipeline'
import { createEngineHost } from './engineHost'
import type { EngineRequest } from './engineMessages'
import { showIn } from './showIn'

const scope = self as unknown as DedicatedWorkerGlobalScope

const serve = createEngineHost({
  engine: createSheetEngine(),
  analyses,
  show: showIn,
  answer: (message) => scope.postMessage(message),
})

scope.onmessage = (event: MessageEvent<EngineRequest>) => serve(event.data)
