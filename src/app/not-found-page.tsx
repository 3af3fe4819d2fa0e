import { Link } from 'react-router-dom';

export const NotFoundPage = () => (
  <main className="page" id="main">
    <div className="blank">
      <h1>There is no such page</h1>
      <p>The address may be old, or it may belong to another ward.</p>
      <Link className="btn" to="/">
        Go to my ward
      </Link>
    </div>
  </main>
);
