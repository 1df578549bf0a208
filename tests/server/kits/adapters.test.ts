import { describeContract } from './contract.ts';

describeContract('Node.js kit', 'node $A/kit.mjs');
describeContract('Python, by hand', 'python3 $A/plain.py');
describeContract('POSIX shell, by hand', 'sh $A/plain.sh');
