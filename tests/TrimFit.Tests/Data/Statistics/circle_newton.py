"""Circles of least squared distance through three published point sets: Newton with the exact Hessian, 40 digits (Python 3.11)."""
from decimal import Decimal as D, getcontext
getcontext().prec=40
sets={'six':([1,2,5,7,9,3],[7,6,8,7,5,7],(4.7,2.98)),'full':([9,35,-13,10,23,0],[34,10,6,-14,27,-10],(10.5,9.66)),'arc':([36,36,19,18,33,26],[14,10,28,31,18,26],(9.89,3.69))}
for k,(X,Y,c0) in sets.items():
    X=[D(x) for x in X];Y=[D(y) for y in Y];n=len(X)
    a,b=D(str(c0[0])),D(str(c0[1]));R=sum(((x-a)**2+(y-b)**2).sqrt() for x,y in zip(X,Y))/n
    for it in range(50):
        g=[D(0)]*3;H=[[D(0)]*3 for _ in range(3)];S=D(0)
        for x,y in zip(X,Y):
            dx,dy=a-x,b-y;r=(dx*dx+dy*dy).sqrt();u,v=dx/r,dy/r;d=r-R;S+=d*d
            g[0]+=d*u;g[1]+=d*v;g[2]-=d
            H[0][0]+=u*u+d*(1-u*u)/r;H[0][1]+=u*v-d*u*v/r;H[1][1]+=v*v+d*(1-v*v)/r
            H[0][2]-=u;H[1][2]-=v;H[2][2]+=1
        H[1][0]=H[0][1];H[2][0]=H[0][2];H[2][1]=H[1][2]
        M=[H[i][:]+[-g[i]] for i in range(3)]
        for i in range(3):
            for j in range(3):
                if j!=i:
                    f=M[j][i]/M[i][i]
                    M[j]=[p-f*q for p,q in zip(M[j],M[i])]
        s=[M[i][3]/M[i][i] for i in range(3)]
        a+=s[0];b+=s[1];R+=s[2]
        if max(map(abs,s))<D('1e-35'):break
    print(k,it,str(a)[:16],str(b)[:16],str(R)[:16],str(S)[:16])
