import { actions, can, roles, type Action, type Role } from '#app/domain/access/roles.ts'
import { Icon } from '#app/components/icons.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { listPeople } from '#app/server/data/people.server.ts'
import { requireMember } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/list'

export const meta: Route.MetaFunction = () => [{ title: 'Team · Inglefield' }]

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMember(request)
  return { viewer: viewerOf(member), you: member.userId, people: await listPeople(member) }
}

/** What each role may do, in words. */
const actionWords: Record<Action, string> = {
  view: 'Read jobs, sites, variants and comparisons',
  'view-installation': 'Read the installation set',
  'create-job': 'Open a job',
  'edit-brief': 'Change the brief',
  'edit-site': 'Change the site',
  'edit-layout': 'Move heaters',
  submit: 'Send a variant to review',
  review: 'Review: approve, return, give exceptions with a reason',
  'edit-rules': 'Change rule sets',
  'edit-catalogue': 'Change the catalogue',
  'edit-beams': 'Give a heater its measured beam',
  'edit-prices': 'Change prices',
  'send-offer': 'Send offers',
  export: 'Take pictures and tables away',
  'enter-readings': 'Enter as-built and readings',
  'manage-people': 'Invite people and change roles',
}

export default function TeamPage({ loaderData: { viewer, you, people } }: Route.ComponentProps) {
  type Person = (typeof people)[number]
  const showsAddress = people.some(({ email }) => email !== null)
  const columns: Column<Person>[] = [
    {
      key: 'name',
      heading: 'Name',
      names: true,
      sortBy: ({ name }) => name,
      cell: ({ id, name }) => (
        <>
          {name}
          {id === you && <span className="ml-2 font-regular text-ink-3">you</span>}
        </>
      ),
    },
    { key: 'role', heading: 'Role', sortBy: ({ role }) => roles.indexOf(role), cell: ({ role }) => role },
    ...(showsAddress ? [{ key: 'email', heading: 'E-mail', cell: ({ email }: Person) => email ?? '–' }] : []),
  ]
  return (
    <PageFrame viewer={viewer}>
      <h1 className="pt-1 text-xl font-strong">Team</h1>
      <p className="mt-0.5 text-ink-2">{viewer.organisationName}</p>
      <div className="mt-5 grid gap-x-12 gap-y-10 desk:grid-cols-[minmax(0,30rem)_minmax(0,1fr)]">
        <section aria-label="People">
          <DataTable
            caption="People of the organisation"
            columns={columns}
            rows={people}
            rowKey={({ id }) => id}
            rowProps={() => ({ className: 'border-t border-rule h-9' })}
          />
        </section>
        <section aria-labelledby="roles" className="min-w-0">
          <h2 id="roles" className="mb-2 text-sm font-strong">
            What each role may do
          </h2>
          <div className="overflow-x-auto" tabIndex={0} role="region" aria-label="Roles and what they may do">
            <RolesTable />
          </div>
        </section>
      </div>
    </PageFrame>
  )
}

function RolesTable() {
  const columns: Column<Action>[] = [
    { key: 'action', heading: 'May', names: true, cell: (action) => actionWords[action] },
    ...roles.map((role) => ({
      key: role,
      heading: role,
      className: 'text-center!',
      cell: (action: Action) => <May role={role} action={action} />,
    })),
  ]
  return <DataTable caption="What each role may do" columns={columns} rows={actions} rowKey={(action) => action} />
}

function May({ role, action }: { role: Role; action: Action }) {
  if (!can(role, action)) return <span className="text-ink-3">–</span>
  return (
    <span className="inline-flex text-moss">
      <Icon name="tick" />
      <span className="sr-only">yes</span>
    </span>
  )
}
