import { Button, Checkbox, Code, CopyButton, Paper, Stack, TextInput } from '@mantine/core';
import { useForm } from '@mantine/form';
import { API_KEY_SCOPES, type ApiKeyScope, can, routes } from '@skyberth/shared';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';
import { fieldErrors, sentenceOf } from '../../lib/problem-fields.js';
import { useSession } from '../../lib/session.js';
import { ProblemNotice } from '../../ui/problem-notice.js';
import { keysQuery } from './key-queries.js';
import { SCOPE_WORDS } from './scope-words.js';

interface Wish {
  readonly name: string;
  readonly scopes: ApiKeyScope[];
  readonly lastDay: string;
}

export function NewKeyForm() {
  const client = useQueryClient();
  const { active } = useSession();
  const form = useForm<Wish>({ initialValues: { name: '', scopes: [], lastDay: '' } });
  const make = useMutation({
    mutationFn: ({ name, scopes, lastDay }: Wish) =>
      call(routes.makeApiKey, { body: { name, scopes, endsUtc: endOf(lastDay) } }),
    onSuccess: () => {
      form.reset();
      return client.invalidateQueries({ queryKey: keysQuery().queryKey });
    },
    onError: (error) => {
      const { endsUtc, ...errors } = fieldErrors(error);
      form.setErrors({ ...errors, ...(endsUtc ? { lastDay: endsUtc } : {}) });
    },
  });
  const scopes = API_KEY_SCOPES.filter((scope) => can(active, scope));
  return (
    <Paper withBorder p="md" maw={640}>
      <form onSubmit={form.onSubmit((wish) => make.mutate(wish))} noValidate aria-label="Make a key">
        <Stack>
          {make.error && <ProblemNotice title="No key was made">{sentenceOf(make.error)}</ProblemNotice>}
          {make.data && <Shown name={make.data.apiKey.name} secret={make.data.secret} onDone={make.reset} />}
          <TextInput
            label="Name"
            description="The program or the rack it is for"
            required
            {...form.getInputProps('name')}
          />
          <Checkbox.Group label="What it may do" required {...form.getInputProps('scopes')}>
            <Stack gap="xs" mt="xs">
              {scopes.map((scope) => (
                <Checkbox key={scope} value={scope} label={SCOPE_WORDS[scope]} description={scope} />
              ))}
            </Stack>
          </Checkbox.Group>
          <TextInput
            type="date"
            label="Last day, UTC"
            description="Left empty, it is good until it is revoked"
            {...form.getInputProps('lastDay')}
          />
          <Button type="submit" loading={make.isPending}>
            Make the key
          </Button>
        </Stack>
      </form>
    </Paper>
  );
}

interface ShownProps {
  readonly name: string;
  readonly secret: string;
  readonly onDone: () => void;
}

function Shown({ name, secret, onDone }: ShownProps) {
  return (
    <div role="status">
      <p>
        The key {name} is shown only now. Send it as <Code>Authorization: Bearer</Code> and keep it like a password.
      </p>
      <Code block style={{ overflowWrap: 'anywhere', whiteSpace: 'pre-wrap' }}>
        {secret}
      </Code>
      <Button.Group mt="xs">
        <CopyButton value={secret}>
          {({ copied, copy }) => (
            <Button variant="default" size="xs" onClick={copy}>
              {copied ? 'Copied' : 'Copy'}
            </Button>
          )}
        </CopyButton>
        <Button variant="default" size="xs" onClick={onDone}>
          I have kept it
        </Button>
      </Button.Group>
    </div>
  );
}

const DAY_MS = 86_400_000;

/** A last day counts whole. */
function endOf(lastDay: string): string | null {
  return lastDay === '' ? null : new Date(Date.parse(lastDay) + DAY_MS).toISOString();
}
