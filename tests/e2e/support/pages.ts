import { demoValue } from './demo';

/** Every page of the product with the role that looks at it, on the demo scenario. */
export async function demoPages(): Promise<{ role: string; path: string }[]> {
  const operationId = await demoValue(
    'select o.id from operation o join field f on f.operation_id = o.id group by o.id order by count(*) desc limit 1',
  );
  const emptyOperationId = await demoValue(
    'select o.id from operation o left join soil_sample s on s.operation_id = o.id group by o.id order by count(s.id), o.name limit 1',
  );
  const fieldId = await demoValue('select id from field where operation_id = ?1 order by area_acres desc limit 1', [operationId]);
  const emptyFieldId = await demoValue('select id from field where operation_id = ?1 limit 1', [emptyOperationId]);
  const varietyId = await demoValue("select id from variety where published = 1 and release = 'full' order by code limit 1");
  const varieties = (await demoValue(
    "select group_concat(id) from (select id from variety where published = 1 and release = 'full' order by code limit 3)",
  )) as string;
  const season = await demoValue('select current_season from dealership limit 1');
  return [
    { role: 'signed out', path: '/' },
    { role: 'signed out', path: '/sign-in' },
    { role: 'signed out', path: '/forgot-password' },
    { role: 'signed out', path: '/reset-password/no-such-link' },
    { role: 'signed out', path: '/invitation/no-such-link' },
    { role: 'signed out', path: '/sheet/no-such-link' },
    { role: 'grower', path: '/fields' },
    { role: 'rep', path: `/fields?operation=${operationId}` },
    { role: 'rep', path: `/fields?operation=${emptyOperationId}` },
    { role: 'manager', path: `/fields/${fieldId}` },
    { role: 'manager', path: `/fields/${fieldId}?layer=ph` },
    { role: 'manager', path: `/fields/${emptyFieldId}` },
    { role: 'manager', path: `/fields/${fieldId}/facts` },
    { role: 'manager', path: `/fields/${fieldId}/compare?varieties=${varieties}` },
    { role: 'manager', path: `/fields/import?operation=${operationId}` },
    { role: 'manager', path: `/soil/import?operation=${operationId}` },
    { role: 'rep', path: '/growers' },
    { role: 'manager', path: `/growers/${operationId}` },
    { role: 'grower', path: '/line-up' },
    { role: 'rep', path: '/line-up' },
    { role: 'rep', path: `/line-up/${varietyId}` },
    { role: 'grower', path: `/line-up/${varietyId}` },
    { role: 'rep', path: '/line-up/import' },
    { role: 'rep', path: '/line-up/new' },
    { role: 'manager', path: '/plans' },
    { role: 'grower', path: '/plans' },
    { role: 'manager', path: `/plans/${operationId}/${season}` },
    { role: 'manager', path: `/plans/${emptyOperationId}/${season}` },
    { role: 'manager', path: '/season' },
    { role: 'manager', path: '/settings/people' },
    { role: 'manager', path: '/settings/audit' },
    { role: 'manager', path: '/settings/zones' },
    { role: 'manager', path: '/settings/rules' },
    { role: 'manager', path: '/settings/stations' },
    { role: 'grower', path: '/settings/account' },
    { role: 'manager', path: '/outbox' },
  ];
}
