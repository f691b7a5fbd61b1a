import { ledger } from '../../../bench/views/amounts';
import type { BenchState, Seen } from '../../../bench/types';
import { useWords } from '../../words';
import { chemicalName, withChemicalNames } from './chemicalName';

interface Props {
  state: BenchState;
  vessel: string;
  seen: Seen;
}

const mmol = (value: number): string => value.toFixed(3).replace('-', '\u2212');

/** Amounts before and after the last addition that still stands, as a table. */
export default function MoleLedger({ state, vessel, seen }: Props) {
  const words = useWords();
  const found = ledger(state, vessel, seen);
  const label =
    state.scene.vessels[vessel]?.label ??
    state.spec.vessels.find((one) => one.id === vessel)?.label ??
    vessel;
  return (
    <section className="part">
      <h3>
        Mole ledger <span className="h3-note">in the {label.toLowerCase()}, mmol</span>
      </h3>
      {found ? (
        <>
          <table className="notebook ledger">
            <thead>
              <tr>
                <th scope="col">Species</th>
                <th scope="col" className="number">
                  Before
                </th>
                <th scope="col" className="number">
                  Change
                </th>
                <th scope="col" className="number">
                  After
                </th>
              </tr>
            </thead>
            <tbody>
              {found.rows.map((row) => (
                <tr key={row.species}>
                  <th scope="row">{chemicalName(row.species)}</th>
                  <td className="number">{words(mmol(row.before_mmol))}</td>
                  <td className="number">
                    {row.change_mmol > 0 ? '+' : ''}
                    {words(mmol(row.change_mmol))}
                  </td>
                  <td className="number">{words(mmol(row.after_mmol))}</td>
                </tr>
              ))}
            </tbody>
          </table>
          <p className="says">
            {withChemicalNames(
              words(found.sentence),
              found.rows.map((row) => row.species),
            )}
          </p>
        </>
      ) : (
        <p className="empty">
          It shows the amounts before and after the last addition. Nothing has been added yet, or they are
          hidden.
        </p>
      )}
    </section>
  );
}
