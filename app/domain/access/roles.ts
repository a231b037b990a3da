/** The roles of an organisation's people. A customer has no account: an offer link shows one offer. */
export const roles = ['owner', 'designer', 'engineer', 'sales', 'installer'] as const
export type Role = (typeof roles)[number]

/**
 * Who may do what. `view` reads jobs, sites, variants and comparisons; `view-installation` reads the installation set
 * only; `edit-beams` gives a model a beam that was measured; `export` takes pictures and tables away; `submit` asks for a review, `review` answers it and gives exceptions.
 */
const allowed = {
  view: ['owner', 'designer', 'engineer', 'sales'],
  'view-installation': ['owner', 'designer', 'engineer', 'sales', 'installer'],
  'create-job': ['owner', 'designer', 'engineer', 'sales'],
  'edit-brief': ['owner', 'designer', 'engineer', 'sales'],
  'edit-site': ['owner', 'designer', 'engineer'],
  'edit-layout': ['owner', 'designer', 'engineer'],
  submit: ['owner', 'designer', 'engineer'],
  review: ['owner', 'engineer'],
  'edit-rules': ['owner', 'engineer'],
  'edit-catalogue': ['owner'],
  'edit-beams': ['owner', 'engineer'],
  'edit-prices': ['owner'],
  'send-offer': ['owner', 'sales'],
  export: ['owner', 'designer', 'engineer', 'sales'],
  'enter-readings': ['owner', 'installer'],
  'manage-people': ['owner'],
} satisfies Record<string, readonly Role[]>

/** Something a person may be allowed to do. */
export type Action = keyof typeof allowed

/** Every action, for tables and tests. */
export const actions: readonly Action[] = [
  'view',
  'view-installation',
  'create-job',
  'edit-brief',
  'edit-site',
  'edit-layout',
  'submit',
  'review',
  'edit-rules',
  'edit-catalogue',
  'edit-beams',
  'edit-prices',
  'send-offer',
  'export',
  'enter-readings',
  'manage-people',
]

/** Whether a role may do it. Nobody reviews their own work: that is asked of the person, not of the role. */
export function can(role: Role, action: Action): boolean {
  const permitted: readonly Role[] = allowed[action]
  return permitted.includes(role)
}
