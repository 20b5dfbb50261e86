import type { DemoScheme } from '../write-scheme'
import { BROOK_TROUT } from './brook-trout'
import { BURBOT } from './burbot'
import { EMBER } from './ember'
import { HERRING } from './herring'
import { MACKEREL } from './mackerel'
import { PERCH } from './perch'
import { ROACH } from './roach'
import { SHINER } from './shiner'
import { SMELT } from './smelt'

/** The demo wall, oldest first. */
export const DEMO_SCHEMES: readonly DemoScheme[] = [SHINER, BURBOT, EMBER, MACKEREL, SMELT, HERRING, ROACH, BROOK_TROUT, PERCH]
