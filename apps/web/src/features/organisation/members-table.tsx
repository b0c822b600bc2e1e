import { Button, Select, Skeleton, Stack, Table, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { modals } from '@mantine/modals';
import { notifications } from '@mantine/notifications';
import { type Member, ROLES_OF_KIND, type Role, routes } from '@skyberth/shared';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { DayTime } from '../../ui/day-time.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import classes from './organisation.module.css';
import { organisationQueries } from './organisation-queries.js';

const ROLE_WORDS: Readonly<Record<Role, string>> = {
  manager: 'Manager: everything, with members and money',
  member: 'Member: does the work',
  viewer: 'Viewer: reads',
  finance: 'Finance: payouts, ledger, invoices',
  admin: 'Admin: approvals, disputes, accounts, members',
};

/** Roles that exist where the caller belongs. */
const useRoles = (): readonly Role[] => ROLES_OF_KIND[useSession().active.organisationKind];

export function MembersTable({ mayManage }: { readonly mayManage: boolean }) {
  const members = useQuery(organisationQueries.members());
  if (members.isPending) return <Skeleton height={160} />;
  if (members.error)
    return <ProblemNotice title="The members could not be read">{sentenceOf(members.error)}</ProblemNotice>;
  return (
    <Stack>
      <div className={classes.scroll}>
        <Table>
          <Table.Thead>
            <Table.Tr>
              <Table.Th>Name</Table.Th>
              <Table.Th>Role</Table.Th>
              <Table.Th>Last here</Table.Th>
              {mayManage && <Table.Th>Change</Table.Th>}
            </Table.Tr>
          </Table.Thead>
          <Table.Tbody>
            {members.data.items.map((member) => (
              <MemberRow key={member.personId} member={member} mayManage={mayManage} />
            ))}
          </Table.Tbody>
        </Table>
      </div>
      {mayManage && <InviteForm />}
    </Stack>
  );
}

function MemberRow({ member, mayManage }: { readonly member: Member; readonly mayManage: boolean }) {
  const client = useQueryClient();
  const roles = useRoles();
  const refresh = () => client.invalidateQueries({ queryKey: organisationQueries.members().queryKey });
  const refused = (error: Error) =>
    notifications.show({ title: `${member.name} stays as before`, message: sentenceOf(error), color: 'buoy' });
  const change = useMutation({
    mutationFn: (role: Role) => call(routes.changeMember, { params: { personId: member.personId }, body: { role } }),
    onSuccess: refresh,
    onError: refused,
  });
  const remove = useMutation({
    mutationFn: () => call(routes.removeMember, { params: { personId: member.personId } }),
    onSuccess: refresh,
    onError: refused,
  });
  const askRemove = () =>
    modals.openConfirmModal({
      title: `Remove ${member.name}?`,
      children: 'They lose access at once. What they did stays in the records.',
      labels: { confirm: 'Remove', cancel: 'Keep' },
      onConfirm: () => remove.mutate(),
    });
  return (
    <Table.Tr>
      <Table.Td>
        <strong>{member.name}</strong>
        <div>{member.email}</div>
      </Table.Td>
      <Table.Td>
        {mayManage ? (
          <Select
            aria-label={`Role of ${member.name}`}
            data={[...roles]}
            value={member.role}
            allowDeselect={false}
            disabled={change.isPending}
            onChange={(role) => role && change.mutate(role as Role)}
            w={130}
          />
        ) : (
          member.role
        )}
      </Table.Td>
      <Table.Td>
        {member.state === 'invited' ? (
          'invited'
        ) : member.lastSeenUtc ? (
          <DayTime atMs={Date.parse(member.lastSeenUtc)} />
        ) : (
          'not yet'
        )}
      </Table.Td>
      {mayManage && (
        <Table.Td>
          <Button
            variant="default"
            size="xs"
            onClick={askRemove}
            loading={remove.isPending}
            aria-label={`Remove ${member.name}`}
          >
            Remove
          </Button>
        </Table.Td>
      )}
    </Table.Tr>
  );
}

function InviteForm() {
  const client = useQueryClient();
  const roles = useRoles();
  const usual = roles.includes('member') ? 'member' : (roles[0] ?? 'member');
  const form = useForm<{ name: string; email: string; role: Role }>({
    initialValues: { name: '', email: '', role: usual },
  });
  const invite = useMutation({
    mutationFn: (values: typeof form.values) => call(routes.inviteMember, { body: values }),
    onSuccess: (member) => {
      void client.invalidateQueries({ queryKey: organisationQueries.members().queryKey });
      notifications.show({ message: `An invitation is on its way to ${member.email}.` });
      form.reset();
    },
    onError: (error) => form.setErrors(fieldErrors(error)),
  });
  return (
    <form onSubmit={form.onSubmit((values) => invite.mutate(values))} noValidate aria-label="Invite a person">
      {invite.error && <ProblemNotice title="Nobody was invited">{sentenceOf(invite.error)}</ProblemNotice>}
      <div className={classes.row}>
        <TextInput label="Name" required {...form.getInputProps('name')} />
        <TextInput label="E-mail" type="email" required {...form.getInputProps('email')} />
        <Select
          label="Role"
          data={roles.map((role) => ({ value: role, label: ROLE_WORDS[role] }))}
          allowDeselect={false}
          {...form.getInputProps('role')}
        />
        <Button type="submit" loading={invite.isPending}>
          Invite
        </Button>
      </div>
    </form>
  );
}
