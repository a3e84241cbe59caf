import { useNavigate } from 'react-router-dom';
import { BriefEditor } from '../features/briefs/brief-editor';
import { useCreateBrief } from '../features/briefs/queries';
import { ButtonLink } from '../ui/button';
import { PageHeader } from '../ui/page-header';
import { tell } from '../ui/toast';

export function Component() {
  const navigate = useNavigate();
  const create = useCreateBrief();
  return (
    <BriefEditor
      brief={null}
      saveLabel="Save the brief"
      save={(document) => create.mutateAsync(document)}
      onSaved={(brief) => {
        tell.done(`${brief.number} saved`);
        void navigate(`/briefs/${brief.id}`);
      }}
      header={(save) => (
        <PageHeader
          title="A new brief"
          crumbs={[{ label: 'Briefs', to: '/briefs' }]}
          meta="Write quantities as they come: 12 mm, 0.47 in, 0.5 g, 1.3 mW. The text is kept on this device until it is saved."
          actions={
            <>
              <ButtonLink to="/briefs">Cancel</ButtonLink>
              {save}
            </>
          }
        />
      )}
    />
  );
}
