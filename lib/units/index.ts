export * from './quantities'
