import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate, useParams } from 'react-router-dom';
import { toast } from 'sonner';
import { newId } from '#shared/kernel/ids.ts';
import { type Site, siteBody } from '#shared/sites/sites.api.ts';
import { paths } from '../app/paths.ts';
import { useSession } from '../app/session.queries.ts';
import { useSendForm } from '../lib/useSendForm.ts';
import { TextArea, TextField } from '../ui/Field.tsx';
import { Form } from '../ui/Form.tsx';
import { Loaded } from '../ui/Loaded.tsx';
import { Page } from '../ui/Page.tsx';
import { siteQuery, useSaveSite } from './sites.queries.ts';

export function SiteFormPage() {
  const { id } = useParams();
  return id ? <ChangeSite id={id} /> : <NewSite />;
}

function NewSite() {
  const [id] = useState(newId);
  return (
    <Page title="New site">
      <SiteForm id={id} site={null} />
    </Page>
  );
}

function ChangeSite({ id }: { id: string }) {
  const query = useQuery(siteQuery(id));
  return (
    <Loaded query={query}>
      {(site) => (
        <Page
          title={`Change ${site.name}`}
          lead="Issued statements keep the words that they were issued with."
        >
          <SiteForm id={id} site={site} />
        </Page>
      )}
    </Loaded>
  );
}

function SiteForm({ id, site }: { id: string; site: Site | null }) {
  const { organisation } = useSession();
  const save = useSaveSite(id);
  const navigate = useNavigate();
  const form = useSendForm({
    schema: siteBody,
    start: {
      name: site?.name ?? '',
      address: site?.address ?? '',
      timeZone: site?.timeZone ?? organisation.timeZone,
      principalContractor: site?.principalContractor ?? '',
      emergency: site?.emergency ?? '',
    },
    send: async (body) => {
      await save.mutateAsync(body);
      toast(`Saved ${body.name}.`);
      await navigate(paths.site(id), { replace: true });
    },
  });
  const { errors } = form.formState;
  return (
    <div className="max-w-lg">
      <Form form={form} act="Save">
        <TextField label="Name" {...form.register('name')} error={errors.name?.message} />
        <TextField
          label="Address"
          help="As an ambulance would need it."
          {...form.register('address')}
          error={errors.address?.message}
        />
        <TextField
          label="Time zone"
          list="zones"
          help="Times of this site are shown in it."
          {...form.register('timeZone')}
          error={errors.timeZone?.message}
        />
        <datalist id="zones">
          {Intl.supportedValuesOf('timeZone').map((zone) => (
            <option key={zone} value={zone} />
          ))}
        </datalist>
        <TextField
          label="Principal contractor"
          {...form.register('principalContractor')}
          error={errors.principalContractor?.message}
        />
        <TextArea
          label="Emergency"
          help="Muster point, gate for the ambulance, whatever somebody must know who has never been here."
          {...form.register('emergency')}
          error={errors.emergency?.message}
        />
      </Form>
    </div>
  );
}
