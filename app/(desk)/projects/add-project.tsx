'use client';
import { useMutation } from '@tanstack/react-query';
import { useRouter } from 'next/navigation';
import { Button } from '@/components/ui/button';
import { Field } from '@/components/ui/field';
import { api, pages } from '@/lib/api/addresses';
import { request, RequestError } from '@/lib/api/fetch';

interface Added {
  readonly project: { readonly id: number };
}

export function AddProject() {
  const router = useRouter();
  const add = useMutation({
    mutationFn: (json: { name: string; number: string }) => request<Added>(api.projects, { method: 'POST', json }),
    onSuccess: ({ project }) => router.push(pages.project(project.id)),
  });
  const fields = add.error instanceof RequestError ? (add.error.body.fields ?? {}) : {};
  const general = add.error && Object.keys(fields).length === 0 ? add.error.message : null;
  return (
    <form
      className="flex flex-col gap-3"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        const form = new FormData(event.currentTarget);
        add.mutate({ name: String(form.get('name') ?? ''), number: String(form.get('number') ?? '') });
      }}
    >
      <Field label="Number" name="number" maxLength={40} error={fields.number?.[0]} hint="The office’s own, if it has one." />
      <Field label="Name" name="name" maxLength={120} required error={fields.name?.[0] ?? general} />
      <p>
        <Button type="submit" disabled={add.isPending || add.isSuccess}>
          Add the project
        </Button>
      </p>
    </form>
  );
}
