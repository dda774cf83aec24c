import { formatMean, formatNumber, type LotView, type VerdictView } from '@app/contracts';
import { Link } from 'react-router-dom';
import { urls } from '../../../app/urls';
import { scoreText } from '../../../shared/record/record-words';
import { Mark } from '../../../shared/ui/mark';
import { CONTROL_WORDS } from '../../../shared/ui/mark-words';
import { recordSpanAround } from '../record-span';
import { bothVerdicts, meanDecimals, rangeWords, verdictMark, verdictSentences } from '../verdict-words';
import { WhereItLies } from './where-it-lies';

/** A row a channel: the figures that a hand calculation needs, then what they say. */
export function VerdictTable({ lot }: { lot: LotView }) {
  return (
    <table className="plain folds verdicts">
      <thead>
        <tr>
          <th>Channel</th>
          <th className="is-number">Lot mean</th>
          <th className="is-number">Baseline</th>
          <th className="is-number">Score, limit</th>
          <th className="is-number">Control limits</th>
          <th className="is-number">Specification limits</th>
          <th>Constant baseline</th>
        </tr>
      </thead>
      {lot.verdicts.map((verdict) => (
        <VerdictRows key={verdict.id} verdict={verdict} lot={lot} />
      ))}
    </table>
  );
}

function VerdictRows({ verdict, lot }: { verdict: VerdictView; lot: LotView }) {
  const { channel, lotMean, baseline, constant } = verdict;
  const decimals = meanDecimals(channel.characteristic);
  const mean = (value: number | null) => (value === null ? '–' : formatNumber(value, decimals));
  const mark = verdictMark(verdict, lot);
  return (
    <tbody className="verdict">
      <tr>
        <td className="folds__first">
          <Mark mark={mark} isSilent /> <Link to={urls.channel(channel.id, recordSpanAround(lot))}>{channel.name}</Link>{' '}
          <span className="soft">{channel.characteristic.unit}</span>
        </td>
        <td className="is-number" data-label="Lot mean">
          {lotMean === null ? '–' : <strong>{formatMean(lotMean, channel.characteristic)}</strong>}
        </td>
        <td className="is-number verdict__baseline" data-label="Baseline">
          {mean(baseline)}
        </td>
        <td className="is-number" data-label="Score, limit">
          {scoreWords(verdict)}
        </td>
        <td className="is-number" data-label="Control limits">
          {rangeWords(verdict.controlLow, verdict.controlHigh, decimals)}
        </td>
        <td className="is-number" data-label="Specification limits">
          {rangeWords(verdict.lowerSpecification, verdict.upperSpecification, decimals - 1)}
        </td>
        <td data-label="Constant baseline">
          {CONTROL_WORDS[constant.state]}
          {constant.score !== null && <span className="soft"> {scoreText(constant.score)}</span>}
        </td>
      </tr>
      <tr className="verdict__said">
        <td colSpan={7}>
          <div className="verdict__line">
            <WhereItLies verdict={verdict} mark={mark} />
            <div>
              {verdictSentences(verdict).map(({ text, action }) => (
                <p key={text} className={`verdict__sentence verdict__sentence--${action}`}>
                  {text}
                </p>
              ))}
              <p className="soft">{footing(verdict)}</p>
            </div>
          </div>
        </td>
      </tr>
    </tbody>
  );
}

function scoreWords({ score, limit }: VerdictView): string {
  const value = score === null ? '–' : `${formatNumber(score, 2)}\u202fσ`;
  return limit === null ? value : `${value}, ±${formatNumber(limit, 2)}`;
}

/** What the verdict rests on: "Within control limits; inside specification. 120 readings by BG-204, plan revision 2." */
function footing(verdict: VerdictView): string {
  const words = bothVerdicts(verdict);
  const plan = verdict.planRevision === null ? 'no plan in force' : `plan revision ${verdict.planRevision}`;
  const readings = verdict.readingCount === 1 ? '1 reading' : `${verdict.readingCount} readings`;
  const gauge = verdict.channel.gaugeAssetNumber === '' ? '' : ` by gauge ${verdict.channel.gaugeAssetNumber}`;
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}. ${readings}${gauge}, ${plan}, method ${verdict.methodVersion}.`;
}
