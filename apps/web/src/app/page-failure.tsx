/** What stands in place of a page that could not be shown. */
import { Anchor, Container } from '@mantine/core';
import { Link, useRouteError } from 'react-router-dom';
import { paths } from '../lib/paths.js';
import { sentenceOf } from '../lib/problem-fields.js';
import { EmptyState } from '../ui/empty-state.js';
import { ProblemNotice } from '../ui/problem-notice.js';

export function PageFailure() {
  const error = useRouteError();
  return (
    <Container size="sm" py="xl">
      <ProblemNotice
        title="This page could not be shown"
        onRetry={() => window.location.reload()}
        retryLabel="Load it again"
      >
        {sentenceOf(error)}
      </ProblemNotice>
    </Container>
  );
}

export function NotFoundPage() {
  return (
    <EmptyState
      title="Nothing is moored here"
      action={
        <Anchor component={Link} to={paths.home}>
          Go to your main page
        </Anchor>
      }
    >
      The address may be mistyped, or what it showed belongs to another organisation.
    </EmptyState>
  );
}
