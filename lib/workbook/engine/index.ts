export { createEngine, type EngineOptions } from './create-engine'
