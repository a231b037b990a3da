import { data } from 'react-router'

/** Any address that no other line of routes.ts knows: matched, so that it is answered with the headers of all others. */
export function loader() {
  throw data('Nothing at this address', 404)
}

/** The same for every other method. */
export function action() {
  throw data('Nothing at this address', 404)
}

/** Never shown: the error page is. */
export default function NotFoundPage() {
  return null
}
