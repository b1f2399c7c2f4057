import { sampleCase } from './zz-case';
import { solveFold } from '@/lib/physics/fold/solve-fold';
import { displayedSections } from '@/lib/physics/fold/displayed-sections';
const { problem, slab, partitions } = sampleCase(183);
console.dir({parts:problem.parts,p:{...problem.prescription},k:problem.keepClear,m:problem.marginMm,reach:problem.tissueReachMm,iso:problem.isocentreZMm,slab,partitions},{depth:7});
const s=solveFold(problem); console.log(s.requirement(partitions));
const d=displayedSections(problem); console.dir(d.clear,{depth:6}); console.dir(d.margin); console.dir(d.tissue,{depth:5});
