import { useEffect } from 'react';
import { Link, useParams } from 'react-router-dom';
import { NotFoundPage } from '../../../app/not-found-page';
import { urls } from '../../../app/urls';
import { useLine } from '../../../shared/line-context/line-context';
import { useSession } from '../../../shared/session/session';
import { ActionLink } from '../../../shared/ui/action';
import { PageHeading } from '../../../shared/ui/page-heading';
import { ProblemNotice } from '../../../shared/ui/problem-notice';
import { Sheet } from '../../../shared/ui/sheet';
import { Skeleton } from '../../../shared/ui/skeleton';
import { useReadiness, type ReadinessState } from '../api/use-readiness';
import { ReadinessList } from '../components/readiness-list';
import { SectionNavigation } from '../components/section-navigation';
import { readinessWords } from '../readiness';
import { SECTIONS } from '../sections';
import '../set-up.css';

/** Is this plant ready for its first workbook, and what is missing? */
export function SetUpPage() {
  const { plantId: plantText, section: key } = useParams();
  const plantId = Number(plantText);
  const { me, plant, choosePlant } = useSession();
  const isMember = me.memberships.some((membership) => membership.plant.id === plantId);
  useEffect(() => {
    if (isMember && plantId !== plant.id) choosePlant(plantId);
  }, [isMember, plantId, plant.id, choosePlant]);
  const section = SECTIONS.find((one) => one.key === key);
  if (!isMember || (key !== undefined && section === undefined)) return <NotFoundPage />;
  if (plantId !== plant.id) return <Skeleton lines={8} />;
  return <SetUp key={plantId} plantId={plantId} section={section} />;
}

function SetUp({ plantId, section }: { plantId: number; section: (typeof SECTIONS)[number] | undefined }) {
  const { plant, can } = useSession();
  const readiness = useReadiness(plantId);
  const title = `Set-up of ${plant.name}${section === undefined ? '' : `: ${section.name.toLowerCase()}`}`;
  return (
    <>
      <PageHeading
        title={title}
        lead={<Lead plantId={plantId} readiness={readiness} isIndex={section === undefined} />}
        tools={
          section === undefined && can('set_up_plant') ? (
            <ActionLink kind="quiet" to={urls.newPlant()}>
              Set up another plant
            </ActionLink>
          ) : undefined
        }
      />
      <SectionNavigation plantId={plantId} sections={SECTIONS} />
      {section === undefined ? (
        <ReadinessSheet plantId={plantId} readiness={readiness} />
      ) : (
        <section.Component plantId={plantId} />
      )}
    </>
  );
}

interface PartProps {
  plantId: number;
  readiness: ReadinessState;
}

function Lead({ plantId, readiness: { items, isNew }, isIndex }: PartProps & { isIndex: boolean }) {
  const { plant } = useSession();
  // The line keeps its place while the lists are on their way.
  if (items === null) return <>&nbsp;</>;
  const isReady = items.every(({ isThere }) => isThere);
  return (
    <>
      {readinessWords(items, plant.name, isNew)}{' '}
      {!isIndex && !isReady && <Link to={urls.setUp(plantId)}>See which</Link>}
    </>
  );
}

function ReadinessSheet({ plantId, readiness: { items, error, readAgain } }: PartProps) {
  const { can } = useSession();
  const { line } = useLine();
  const isReady = items?.every(({ isThere }) => isThere) === true;
  return (
    <Sheet
      margin={
        <>
          <p>Each part can also be changed later; nothing that was measured is ever deleted.</p>
          {!can('set_up_plant') && (
            <p>
              An administrator sets the plant up.
              {can('propose_specification') && ' Specifications are proposed here by quality engineers.'}
              {can('approve_specification') && ' You approve those that others proposed.'}
            </p>
          )}
        </>
      }
    >
      {items === null && error === null && <Skeleton lines={8} label="Loading the set-up" />}
      {items === null && error !== null && (
        <ProblemNotice problem={error} what="The set-up could not be loaded." onRetry={readAgain} />
      )}
      {items !== null && <ReadinessList plantId={plantId} items={items} />}
      {isReady && line !== null && can('upload_intake') && (
        <p className="readiness__next">
          <ActionLink kind="quiet" to={urls.intakes(line.id)}>
            Upload a workbook of {line.name}
          </ActionLink>
        </p>
      )}
    </Sheet>
  );
}
