import { useLine } from '../../shared/line-context/line-context';

export function LineStrip() {
  const { line } = useLine();
  return <div className="strip" aria-label={line?.name} />;
}
