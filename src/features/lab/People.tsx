import { zodResolver } from '@hookform/resolvers/zod';
import {
  personInputSchema,
  ROLES,
  type CustomerJson,
  type PersonJson,
  type Role,
} from '@shared/schemas/account';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import type { z } from 'zod';
import { Button } from '@/components/Button';
import { DataTable, type Column } from '@/components/DataTable';
import { Checkbox, Field, SelectField } from '@/components/Field';
import { Notice } from '@/components/Notice';
import { Panel } from '@/components/Panel';
import { newKey } from '@/lib/api';
import { formatMoment } from '@/lib/format';
import { showIssues } from '@/lib/formErrors';
import { optionalId } from '@/lib/optionalId';
import { useChangePerson, useInviteAgain, useInvitePerson } from '@/queries/lab';

interface Invitation {
  readonly name: string;
  readonly address: string;
  readonly expiresAt: string;
}

function InvitationNotice({ name, address, expiresAt }: Invitation) {
  return (
    <Notice claim={`One-time address for ${name}.`}>
      Shown once, good until {formatMoment(expiresAt)}; hand it over in person or by a channel you
      trust. <code className="block text-2 break-all mt-2">{address}</code>
    </Notice>
  );
}

interface InviteFormProps {
  readonly customers: readonly CustomerJson[];
  readonly onInvited: (invitation: Invitation) => void;
}

function InviteForm({ customers, onInvited }: InviteFormProps) {
  const invite = useInvitePerson();
  const [key, setKey] = useState(newKey);
  const { register, handleSubmit, setError, reset, formState, watch } = useForm<
    z.input<typeof personInputSchema>,
    unknown,
    z.output<typeof personInputSchema>
  >({
    resolver: zodResolver(personInputSchema),
    defaultValues: { name: '', email: '', roles: [], customerId: null },
  });
  const { errors } = formState;
  const isCustomer = watch('roles').includes('customer');
  const onSubmit = handleSubmit(async (body) => {
    try {
      const { person, address, expiresAt } = await invite.mutateAsync({ body, key });
      setKey(newKey());
      reset();
      onInvited({ name: person.name, address, expiresAt });
    } catch (error) {
      showIssues(error, setError);
    }
  });
  return (
    <form onSubmit={(event) => void onSubmit(event)} noValidate>
      <fieldset disabled={invite.isPending} className="grid gap-3">
        <Field label="Name" error={errors.name?.message} {...register('name')} />
        <Field label="E-mail" type="email" error={errors.email?.message} {...register('email')} />
        <div role="group" aria-label="Roles" className="grid grid-cols-2 phone:grid-cols-3">
          {ROLES.map((role) => (
            <Checkbox key={role} value={role} label={role} {...register('roles')} />
          ))}
        </div>
        {errors.roles && (
          <p className="text-2 text-stop">{errors.roles.message ?? errors.roles.root?.message}</p>
        )}
        {isCustomer && (
          <SelectField
            label="Belongs to"
            options={[
              { value: '', label: 'choose a customer' },
              ...customers.map(({ id, name }) => ({ value: id, label: name })),
            ]}
            error={errors.customerId?.message}
            {...register('customerId', {
              setValueAs: optionalId,
            })}
          />
        )}
        {errors.root?.message !== undefined && <Notice tone="stop">{errors.root.message}</Notice>}
        <div>
          <Button type="submit" look="primary" isBusy={invite.isPending}>
            Make a one-time address
          </Button>
        </div>
      </fieldset>
    </form>
  );
}

interface PeopleProps {
  readonly people: readonly PersonJson[];
  readonly customers: readonly CustomerJson[];
}

/** Who works here, and how somebody new comes in. */
export function People({ people, customers }: PeopleProps) {
  const [invitation, setInvitation] = useState<Invitation | null>(null);
  const inviteAgain = useInviteAgain();
  const change = useChangePerson();
  const again = async (person: PersonJson) => {
    const { address, expiresAt } = await inviteAgain.mutateAsync(person.id);
    setInvitation({ name: person.name, address, expiresAt });
  };
  const archive = (person: PersonJson) => {
    change.mutate({
      id: person.id,
      roles: [...person.roles] as Role[],
      isActive: !person.isActive,
      version: person.version,
    });
  };
  const columns: readonly Column<PersonJson>[] = [
    { key: 'name', header: 'Name', cell: ({ name }) => name },
    { key: 'email', header: 'E-mail', cell: ({ email }) => email },
    { key: 'roles', header: 'Roles', cell: ({ roles }) => roles.join(', ') },
    {
      key: 'state',
      header: 'State',
      cell: ({ isActive, hasPassword }) =>
        !isActive ? 'archived' : hasPassword ? 'active' : 'invited',
    },
    {
      key: 'act',
      header: <span className="sr-only">Actions</span>,
      cell: (person) => (
        <span className="flex gap-4 justify-end">
          <button
            type="button"
            className="link"
            onClick={() => {
              void again(person);
            }}
          >
            New address<span className="sr-only"> for {person.name}</span>
          </button>
          <button type="button" className="link" onClick={() => archive(person)}>
            {person.isActive ? 'Archive' : 'Bring back'}
            <span className="sr-only"> {person.name}</span>
          </button>
        </span>
      ),
    },
  ];
  return (
    <>
      <Panel name="People" fact={`${people.length}`} isFlush>
        <DataTable
          caption="People of the lab"
          columns={columns}
          rows={people}
          rowKey={({ id }) => id}
          rowClass={({ isActive }) => !isActive && 'faint'}
        />
      </Panel>
      {change.error && <Notice tone="stop">{change.error.message}</Notice>}
      {invitation && <InvitationNotice {...invitation} />}
      <Panel name="Add a person">
        <InviteForm customers={customers} onInvited={setInvitation} />
      </Panel>
    </>
  );
}
