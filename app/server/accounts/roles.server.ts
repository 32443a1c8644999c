import { createAccessControl } from 'better-auth/plugins/access'
import { defaultStatements } from 'better-auth/plugins/organization/access'

// What better-auth's own organization calls may do. Everything else asks ~/access, which is the authority.
export const accessControl = createAccessControl(defaultStatements)

export const roles = {
  principal: accessControl.newRole({
    organization: ['update', 'delete'],
    member: ['create', 'update', 'delete'],
    invitation: ['create', 'cancel'],
    team: [],
    ac: ['read'],
  }),
  engineer: accessControl.newRole({ organization: [], member: [], invitation: [], team: [], ac: ['read'] }),
  checker: accessControl.newRole({ organization: [], member: [], invitation: [], team: [], ac: ['read'] }),
  reader: accessControl.newRole({ organization: [], member: [], invitation: [], team: [], ac: ['read'] }),
}
