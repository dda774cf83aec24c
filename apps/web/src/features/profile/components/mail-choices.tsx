import { MAIL_KIND_NAMES, type MembershipView } from '@app/contracts';
import { EmptyNote } from '../../../shared/ui/empty-note';
import { Loaded } from '../../../shared/ui/loaded';
import { Sheet } from '../../../shared/ui/sheet';
import { useToast } from '../../../shared/ui/toast';
import { useChooseMail, useSubscriptions } from '../api/profile';

/** What comes by mail from one plant; each choice is kept at once. */
export function MailChoices({ plant }: { plant: MembershipView['plant'] }) {
  const query = useSubscriptions(plant.id);
  const choose = useChooseMail(plant.id);
  const { failed } = useToast();
  return (
    <Sheet
      title={`Mail from ${plant.name}`}
      margin={
        <p>Until you choose, it follows from your roles. Mail about lines is of those that you are assigned to.</p>
      }
    >
      <Loaded
        query={query}
        failure="What you get by mail could not be loaded."
        isEmpty={(answer) => answer.subscriptions.length === 0}
        empty={<EmptyNote>Your roles at this plant bring no mail.</EmptyNote>}
      >
        {(answer) => (
          <fieldset className="profile__choices">
            <legend className="visually-hidden">What comes by mail</legend>
            {answer.subscriptions.map(({ kind, isWanted }) => (
              <label key={kind} className="choice">
                <input
                  type="checkbox"
                  checked={isWanted}
                  disabled={choose.isPending}
                  onChange={() =>
                    choose.mutate({ subscriptions: [{ kind, isWanted: !isWanted }] }, { onError: failed })
                  }
                />
                {MAIL_KIND_NAMES[kind]}
              </label>
            ))}
          </fieldset>
        )}
      </Loaded>
    </Sheet>
  );
}
