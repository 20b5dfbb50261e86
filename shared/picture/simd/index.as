export { glow } from './glow'
export { lay } from './lay'
