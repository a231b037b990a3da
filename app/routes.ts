import type { RouteConfig } from '@react-router/dev/routes'

/** Every URL of the product, one line each. */
export default [] satisfies RouteConfig
