import { useState } from 'react';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import {
  createMemberSchema,
  memberSchema,
  roleSchema,
  type CreateMember,
  type Member,
  type Role,
  type UpdateMember,
} from '@steepfall/shared/contracts';
import { useForm } from 'react-hook-form';
import { Banner } from '#components/banner.tsx';
import { Button } from '#components/button.tsx';
import { Dialog } from '#components/dialog.tsx';
import { PasswordField, SelectField, TextField } from '#components/field.tsx';
import { LevelRule } from '#components/level-rule.tsx';
import { Menu } from '#components/menu.tsx';
import { Failed, Waiting } from '#components/quiet-state.tsx';
import { StatusChip } from '#components/status-chip.tsx';
import { callHubFor } from '#lib/api-client.ts';
import { membersQuery } from '#lib/hub-queries.ts';
import { useKnown, useMay } from '#lib/session.ts';
import { failureWords, fieldProblems } from '#lib/words.ts';
import { SendForm } from '#components/send-form.tsx';

const roleTells: Record<Role, string> = {
  owner: 'may do everything',
  brewer: 'writes recipes, plans and runs batches, looks after the kit',
  hand: 'runs the day and rehearses',
  taster: 'tastes blind, sees no batch',
  pourer: 'sees what is in the kegs',
};

export function MembersSection() {
  const may = useMay();
  const { member: self } = useKnown();
  const [isAdding, setIsAdding] = useState(false);
  const [edited, setEdited] = useState<Member | null>(null);
  const members = useQuery(membersQuery);
  const change = useChangeMember();
  const mayManage = may('members:manage');
  return (
    <section aria-labelledby="members" className="grid gap-4">
      <LevelRule
        id="members"
        aside={mayManage ? <Button onClick={() => setIsAdding(true)}>Add a member</Button> : null}
      >
        Members
      </LevelRule>
      {members.error ? (
        <Failed title="The members may be old" onRetry={() => void members.refetch()}>
          {failureWords(members.error)}
        </Failed>
      ) : null}
      {change.isError ? (
        <Banner tone="act" title="Nothing was changed">
          {failureWords(change.error)}
        </Banner>
      ) : null}
      {members.isPending ? <Waiting>Fetching the members.</Waiting> : null}
      <ul>
        {(members.data ?? []).map((member) => (
          <li key={member.id} className="flex flex-wrap items-center gap-x-8 gap-y-1 border-b border-hair py-3">
            <div className="min-w-60 flex-1">
              <p className="text-lead font-medium">
                {member.displayName}
                {member.id === self.id ? <span className="text-body font-normal text-soft"> you</span> : null}
              </p>
              <p className="break-all text-body text-soft">{member.email}</p>
            </div>
            <p className="text-body">
              {member.isActive ? (
                <>
                  <span className="font-medium">{member.role}</span>
                  <span className="hidden text-soft xl:inline">, {roleTells[member.role]}</span>
                </>
              ) : (
                <StatusChip shape="ring" tone="soft">
                  no access
                </StatusChip>
              )}
            </p>
            {mayManage ? (
              <Menu
                label={
                  <>
                    Change<span className="sr-only"> {member.displayName}</span>
                  </>
                }
                choices={[
                  { label: 'Name and role', onChoose: () => setEdited(member) },
                  member.isActive
                    ? {
                        label: 'Take access away',
                        isDanger: true,
                        isDisabled: member.id === self.id,
                        onChoose: () => change.mutate({ id: member.id, body: { isActive: false } }),
                      }
                    : {
                        label: 'Give access again',
                        onChoose: () => change.mutate({ id: member.id, body: { isActive: true } }),
                      },
                ]}
              />
            ) : null}
          </li>
        ))}
      </ul>
      {isAdding ? <AddMemberDialog onClose={() => setIsAdding(false)} /> : null}
      {edited ? <EditMemberDialog member={edited} onClose={() => setEdited(null)} /> : null}
    </section>
  );
}

function useChangeMember() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ id, body }: { id: string; body: UpdateMember }) =>
      callHubFor(memberSchema, `members/${id}`, { method: 'PATCH', body }),
    onSettled: () => void client.invalidateQueries({ queryKey: membersQuery.queryKey }),
  });
}

function RoleOptions() {
  return roleSchema.options.map((role) => (
    <option key={role} value={role}>
      {role}: {roleTells[role]}
    </option>
  ));
}

function AddMemberDialog({ onClose }: { onClose: () => void }) {
  const client = useQueryClient();
  const { register, handleSubmit, setError, formState } = useForm<CreateMember>({
    resolver: zodResolver(createMemberSchema),
    defaultValues: { displayName: '', email: '', role: 'hand', password: '' },
  });
  const add = useMutation({
    mutationFn: (body: CreateMember) => callHubFor(memberSchema, 'members', { method: 'POST', body }),
    onSuccess: () => {
      void client.invalidateQueries({ queryKey: membersQuery.queryKey });
      onClose();
    },
    onError: (error) => {
      for (const { field, detail } of fieldProblems(error)) setError(field as keyof CreateMember, { message: detail });
    },
  });
  const { errors } = formState;
  return (
    <Dialog isOpen onClose={onClose} title="Add a member">
      <SendForm
        onSubmit={(event) => void handleSubmit((body) => add.mutate(body))(event)}
        onClose={onClose}
        act="Add"
        busyLabel="Adding"
        isBusy={add.isPending}
        failedTitle="Nobody was added"
        error={add.isError && fieldProblems(add.error).length === 0 ? add.error : null}
      >
        <TextField label="Name" autoComplete="off" error={errors.displayName?.message} {...register('displayName')} />
        <TextField
          label="E-mail"
          type="email"
          autoComplete="off"
          error={errors.email?.message}
          {...register('email')}
        />
        <SelectField label="Role" error={errors.role?.message} {...register('role')}>
          {RoleOptions()}
        </SelectField>
        <PasswordField
          label="First password"
          hint="12 characters or more. Tell it to them in person."
          autoComplete="new-password"
          error={errors.password?.message}
          {...register('password')}
        />
      </SendForm>
    </Dialog>
  );
}

function EditMemberDialog({ member, onClose }: { member: Member; onClose: () => void }) {
  const change = useChangeMember();
  const { register, handleSubmit } = useForm({ defaultValues: { displayName: member.displayName, role: member.role } });
  return (
    <Dialog isOpen onClose={onClose} title={member.displayName}>
      <SendForm
        onSubmit={(event) =>
          void handleSubmit((body) => change.mutate({ id: member.id, body }, { onSuccess: onClose }))(event)
        }
        onClose={onClose}
        act="Save"
        busyLabel="Saving"
        isBusy={change.isPending}
        failedTitle="Nothing was changed"
        error={change.error}
      >
        <TextField label="Name" autoComplete="off" {...register('displayName')} />
        <SelectField label="Role" {...register('role')}>
          {RoleOptions()}
        </SelectField>
      </SendForm>
    </Dialog>
  );
}
