import { useNavigate } from 'react-router-dom';
import { useSession } from '../../shared/session/session';
import { urls } from '../urls';

/** The plant's name; a choice where a person belongs to several. */
export function PlantChoice() {
  const { me, plant, choosePlant } = useSession();
  const navigate = useNavigate();
  if (me.memberships.length < 2) {
    return (
      <span className="header__plant" title={`Times are the plant’s own (${plant.timeZone})`}>
        {plant.name}
      </span>
    );
  }
  const choose = (plantId: number) => {
    choosePlant(plantId);
    void navigate(urls.desk());
  };
  return (
    <select
      className="header__choice"
      aria-label="Plant"
      value={plant.id}
      onChange={(event) => choose(Number(event.target.value))}
    >
      {me.memberships.map((item) => (
        <option key={item.plant.id} value={item.plant.id}>
          {item.plant.name}
        </option>
      ))}
    </select>
  );
}
