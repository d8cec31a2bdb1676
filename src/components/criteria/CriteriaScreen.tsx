import { useMemo, useState } from 'react';
import { useAddressParam } from '#components/live/address.ts';
import { useFinding } from '#components/live/hooks.ts';
import { SourceNote } from '#components/figures/SourceNote.tsx';
import { sheetOf } from '#components/ranking/columns.ts';
import {
  BeforeRanks,
  ConnectionNote,
  EstimatesCaution,
  FiguresNotRead,
} from '#components/ranking/Notices.tsx';
import { useRanking } from '#components/ranking/use-ranking.ts';
import { PATTERNS } from '#components/ranking/ValueBar.tsx';
import { inputLockOf, lockOf, type Viewer } from '#components/ranking/viewer.ts';
import {
  Button,
  ChartPatterns,
  EmptyState,
  Finding,
  Notice,
  Segmented,
  Stale,
  toast,
} from '#components/ui/index.ts';
import { evenStatement } from '#components/weights/statement.ts';
import type { Criterion, CriterionGroup } from '#contract/criterion.ts';
import type { RankingStart } from '#contract/ranking.ts';
import { AddCriterion, type OrbitChoice } from './AddCriterion.tsx';
import { CriteriaWeights } from './CriteriaWeights.tsx';
import { CriterionEditor } from './CriterionEditor.tsx';
import { Effect } from './Effect.tsx';
import { GroupsPanel } from './GroupsPanel.tsx';
import { useCriteria } from './use-criteria.ts';
import { useGroups } from './use-groups.ts';
import { criteriaFinding, criteriaWhy } from './words.ts';

interface CriteriaScreenProps {
  studyId: string;
  start: RankingStart;
  criteria: Criterion[];
  groups: CriterionGroup[];
  orbits: OrbitChoice[];
  viewer: Viewer;
  address: { weights: string | null; criterion: string | null };
}

export function CriteriaScreen(props: CriteriaScreenProps) {
  const { studyId, start, criteria, orbits, viewer, address } = props;
  const [whoseParam, setWhose] = useAddressParam('weights', address.weights);
  const [chosen, setChosen] = useAddressParam('criterion', address.criterion);
  const [adding, setAdding] = useState(false);
  const whose = whoseParam === 'mine' ? 'mine' : 'study';
  const list = useCriteria(studyId, criteria);
  const groups = useGroups(studyId, props.groups);
  const live = useRanking(studyId, start, whose);
  const { ranking, model, weights } = live;
  const sheet = useMemo(() => sheetOf(ranking, model), [ranking, model]);
  const inputsLocked = inputLockOf(viewer);
  const weightsLocked = lockOf(viewer, whose);
  const finding = criteriaFinding(ranking);
  useFinding(finding);
  const open = list.items.find(({ id }) => id === chosen) ?? list.items[0];
  const refresh = (): void => {
    live.again();
    weights.refresh();
  };
  const remove = async (criterion: Criterion): Promise<void> => {
    if (!(await list.remove(criterion))) return;
    setChosen(null);
    refresh();
    toast(`${criterion.name} removed.`);
  };
  return (
    <>
      <svg className="rk-patterns" width="0" height="0" aria-hidden="true">
        <ChartPatterns id={PATTERNS} />
      </svg>
      <Finding
        why={<p>{criteriaWhy(list.items)}</p>}
        actions={
          <Button kind="primary" icon="add" notYet={inputsLocked} onClick={() => setAdding(true)}>
            Add criterion
          </Button>
        }
      >
        {finding}
      </Finding>
      {live.error && <FiguresNotRead error={live.error} onAgain={live.again} />}
      {list.failure && (
        <Notice
          fact={list.failure.message}
          requestId={list.failure.requestId}
          actions={
            <Button size="small" onClick={list.forget}>
              Go on
            </Button>
          }
        >
          The criteria are shown as they now are.
        </Notice>
      )}
      {list.items.length === 0 ? (
        <EmptyState
          fact="No criteria yet."
          actions={
            <Button icon="add" notYet={inputsLocked} onClick={() => setAdding(true)}>
              Add criterion
            </Button>
          }
        >
          Add what sites are weighed by: computed from flight mechanics, such as payload a year, or entered
          for each site, such as cost. Columns of an uploaded CSV become criteria by themselves.
        </EmptyState>
      ) : (
        <>
          <div className="rk-bar">
            <Segmented
              legend="Weights"
              value={whose}
              onChange={(value) => setWhose(value === 'mine' ? 'mine' : null)}
              segments={[
                { value: 'study', name: 'Study’s weights' },
                {
                  value: 'mine',
                  name: 'Mine',
                  notYet: viewer.role === 'reader' ? 'A reader keeps no weights of their own.' : undefined,
                },
              ]}
            />
            {live.staleRevision !== null && <Stale revision={live.staleRevision} />}
            <ConnectionNote />
          </div>
          <div className="cr-columns">
            <div>
              <CriteriaWeights
                key={whose}
                studyId={studyId}
                whose={whose}
                items={list.items}
                columns={sheet.columns}
                weights={weights}
                weightsLocked={weightsLocked}
                inputsLocked={inputsLocked}
                chosen={open?.id ?? null}
                onChoose={setChosen}
                onMove={(criterion, position) => void list.move(criterion, position).then(refresh)}
              />
              {model && <SourceNote studyId={studyId} figures={model.figures} />}
              {open && (
                <div className="mt-9">
                  <CriterionEditor
                    key={open.id}
                    studyId={studyId}
                    criterion={open}
                    groups={groups}
                    column={sheet.columns.find(({ criterion }) => criterion.id === open.id)}
                    figures={model?.figures ?? null}
                    leader={ranking.ranked[0]?.siteId}
                    locked={inputsLocked}
                    onKept={(criterion) => {
                      list.take(criterion);
                      live.again();
                    }}
                    onRemove={() => void remove(open)}
                  />
                </div>
              )}
              <div className="mt-9">
                <GroupsPanel
                  groups={groups}
                  criteria={list.items}
                  locked={inputsLocked}
                  onRemoved={({ name }) => {
                    list.again();
                    refresh();
                    toast(`${name} removed.`);
                  }}
                />
              </div>
            </div>
            <div className="cr-effect">
              {ranking.state !== 'ranked' && ranking.state !== 'no-criteria' && (
                <BeforeRanks
                  state={ranking.state}
                  studyId={studyId}
                  onEven={
                    weightsLocked === undefined
                      ? () => weights.state(evenStatement(ranking.criteria))
                      : undefined
                  }
                />
              )}
              <Effect studyId={studyId} sheet={sheet} before={start.ranking} />
            </div>
          </div>
        </>
      )}
      <div className="mt-9">
        <EstimatesCaution />
      </div>
      {adding && (
        <AddCriterion
          studyId={studyId}
          orbits={orbits}
          onClose={() => setAdding(false)}
          onAdded={(criterion) => {
            list.take(criterion);
            setAdding(false);
            setChosen(criterion.id);
            refresh();
          }}
        />
      )}
    </>
  );
}
