import type { DemoPerson } from './types';

const ALL_LINES = ['Coater 2', 'Calender 1', 'Slurry 3'];

/** The people of Marrowby Works, all invented, one for each of the demo sign-ins. */
export const DEMO_PEOPLE: DemoPerson[] = [
  { email: 'engineer@marrowby.example', name: 'Maren Holloway', role: 'engineer', lines: ['Coater 2', 'Calender 1'] },
  { email: 'engineer2@marrowby.example', name: 'Tobias Quayle', role: 'engineer', lines: ['Coater 2', 'Slurry 3'] },
  { email: 'manager@marrowby.example', name: 'Adaeze Thornbury', role: 'quality_manager', lines: ALL_LINES },
  { email: 'lead@marrowby.example', name: 'Colin Prewett', role: 'line_lead', lines: ['Coater 2', 'Calender 1'] },
  { email: 'technician@marrowby.example', name: 'Sunniva Marsh', role: 'technician', lines: ALL_LINES },
  { email: 'director@marrowby.example', name: 'Gideon Ashgrove', role: 'director', lines: [] },
  { email: 'admin@marrowby.example', name: 'Petra Lindvale', role: 'administrator', lines: [] },
];
