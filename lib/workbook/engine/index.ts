export { createEngine, type EngineOptions } from './create-engine'
export { serveEngine } from './serve'
