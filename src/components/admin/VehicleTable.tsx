import type { LibraryVehicle } from '#contract/requirement.ts';
import { formatNumber } from '#contract/format.ts';
import { Button, TableScroll, Tag } from '#components/ui/index.ts';
import { at } from './words.ts';

interface VehicleTableProps {
  vehicles: readonly LibraryVehicle[];
  onEdit: (vehicle: LibraryVehicle) => void;
  onArchive: (vehicle: LibraryVehicle) => void;
}

export function VehicleTable({ vehicles, ...actions }: VehicleTableProps) {
  return (
    <TableScroll label="Vehicle library">
      <table className="table" data-hover="">
        <thead>
          <tr>
            <th scope="col">Vehicle</th>
            <th scope="col" className="num">
              Stages
            </th>
            <th scope="col" className="num">
              Boosters
            </th>
            <th scope="col" className="num">
              Propellant, stages <span className="unit">kg</span>
            </th>
            <th scope="col" className="num">
              Losses <span className="unit">m/s</span>
            </th>
            <th scope="col" className="num">
              Changed <span className="unit">UTC</span>
            </th>
            <th scope="col">
              <span className="sr-only">Changes</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {vehicles.map((entry) => (
            <VehicleRow key={entry.id} entry={entry} {...actions} />
          ))}
        </tbody>
      </table>
    </TableScroll>
  );
}

function VehicleRow({
  entry,
  onEdit,
  onArchive,
}: { entry: LibraryVehicle } & Omit<VehicleTableProps, 'vehicles'>) {
  const { name, code, vehicle, archived } = entry;
  const { gravity, drag, steering } = vehicle.lossesMps;
  const propellantKg = vehicle.stages.reduce((sum, stage) => sum + stage.propellantKg, 0);
  return (
    <tr data-set-aside={archived ? '' : undefined}>
      <th scope="row">
        <span className="name">
          {name} {archived && <Tag>Archived</Tag>}
        </span>
        <span className="sub">{code}</span>
      </th>
      <td className="num">{vehicle.stages.length}</td>
      <td className="num">{vehicle.boosters?.count ?? 0}</td>
      <td className="num">{formatNumber(propellantKg)}</td>
      <td className="num">{formatNumber(gravity + drag + steering)}</td>
      <td className="num">{at(entry.updatedAt)}</td>
      <td>
        <span className="flex justify-end gap-2 whitespace-nowrap">
          <Button size="small" icon="edit" aria-label={`Edit ${name}`} onClick={() => onEdit(entry)}>
            Edit
          </Button>
          <Button
            size="small"
            icon={archived ? 'restore' : 'archive'}
            aria-label={`${archived ? 'Restore' : 'Archive'} ${name}`}
            onClick={() => onArchive(entry)}
          >
            {archived ? 'Restore' : 'Archive'}
          </Button>
        </span>
      </td>
    </tr>
  );
}
