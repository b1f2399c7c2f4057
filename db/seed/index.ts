export { DEMO_SITE_ID, demoId } from './demo-ids';
export { seedDemo, type DemoPerson, type SeedDemo } from './seed-demo';
