/** What the plates of some machines say and where their ports hide. Invented. */
export const PLATES: {
  machine: string;
  place: string;
  refrigerant: string;
  plateCharge: string;
  oil: string;
  metering: 'expansion-valve' | 'orifice';
  portsText: string;
}[] = [
  {
    machine: 'W07',
    place: 'cab-front',
    refrigerant: 'R-134a',
    plateCharge: '1150',
    oil: 'PAG 46, as the plate says',
    metering: 'expansion-valve',
    portsText:
      'Low side behind the left step plate, four bolts, reach up from below. High side under the drier bracket: the cap faces the chassis, feel for it.',
  },
  {
    machine: 'W04',
    place: 'cab-front',
    refrigerant: 'R-134a',
    plateCharge: '1150',
    oil: 'PAG 46, as the plate says',
    metering: 'expansion-valve',
    portsText: 'As on W07. The step plate has been shortened, so no bolts to undo.',
  },
  {
    machine: 'T05',
    place: 'cab-front',
    refrigerant: 'R-134a',
    plateCharge: '850',
    oil: 'PAG 46, as the plate says',
    metering: 'orifice',
    portsText: 'Both ports behind the grille, left. Short coupler only, the long one fouls the fan guard.',
  },
  {
    machine: 'L03',
    place: 'rear-sleeper',
    refrigerant: 'R-134a',
    plateCharge: '1350',
    oil: 'PAG 100, as the plate says',
    metering: 'expansion-valve',
    portsText:
      'Ports are on the front branch. The sleeper branch has none of its own: shut its solenoid to test it apart.',
  },
];

/** The second shop's few cases. */
export const FARSIDE_CASES: unknown[] = [
  {
    id: 'FF-1',
    machineKind: 'reach truck',
    make: 'Tollen',
    model: 'RT-2',
    machineNo: 'F01',
    yard: 'Farside',
    technician: 'Sorrel',
    hours: 2100,
    circuit: 'boom-lift',
    medium: 'hydraulic-oil',
    openedAt: '2026-08-11',
    ambientC: 19,
    complaint: 'Mast sinks with a pallet up.',
    symptoms: ['load-drifts'],
    traceNotes: 'Rod dry, so it goes inside.',
    methods: ['branch-isolation'],
    component: '',
    locationDetail: '',
    failureMode: '',
    causeId: '',
    cause: '',
    repair: '',
    proofNotes: '',
    severity: 2,
  },
  {
    id: 'FF-2',
    machineKind: 'tow tractor',
    make: 'Tollen',
    model: 'TW-1',
    machineNo: 'F02',
    yard: 'Farside',
    technician: 'Sorrel',
    hours: 5400,
    circuit: 'engine-cooling',
    medium: 'coolant',
    openedAt: '2026-09-02',
    ambientC: 16,
    complaint: 'Puddle under the front each morning, gone by noon.',
    symptoms: ['coolant-puddle'],
    traceNotes: 'Pump kit, 1 bar, drip off the clamp within a minute.',
    methods: ['coolant-pressure-kit'],
    component: '',
    locationDetail: '',
    failureMode: '',
    causeId: '',
    cause: '',
    repair: 'Clamp up and a new one on order.',
    proofNotes: '',
    severity: 1,
  },
];
