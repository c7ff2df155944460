/** The bare canvas library with as many plain nodes as the address says: what dragging in our sheet is measured against. */
import { createRoot } from 'react-dom/client';
import { ReactFlow, useNodesState } from 'reactflow';
import 'reactflow/dist/style.css';

const COLUMNS = 20;
const count = Number(new URLSearchParams(location.search).get('nodes') ?? 200);
const nodes = Array.from({ length: count }, (_, k) => ({
  id: `${k}`,
  position: { x: 200 * (k % COLUMNS), y: 140 * Math.floor(k / COLUMNS) },
  data: { label: `Node ${k}` },
}));

function Plain() {
  const [shown, , change] = useNodesState(nodes);
  return <ReactFlow nodes={shown} onNodesChange={change} minZoom={0.25} fitView />;
}

const root = document.getElementById('root');
if (root) createRoot(root).render(<Plain />);
